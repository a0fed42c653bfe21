"""What Alembic runs: the migrations, on the connection and in the transaction that `schema.upgrade` hands in."""

from __future__ import annotations

from alembic import context

from inspector.store.schema import METADATA

context.configure(
    connection=context.config.attributes["connection"],
    target_metadata=METADATA,
    render_as_batch=True,
)
with context.begin_transaction():
    context.run_migrations()
