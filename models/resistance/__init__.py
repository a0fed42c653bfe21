"""What a bar can carry, by published methods: one module a basis."""
