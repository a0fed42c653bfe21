"""The field app: the same store and the same figures as the commands, for a tablet in a gloved hand.

Presenters and states are plain Python; only screens and widgets know kivy, and nobody imports them but `inspector app`.
"""
