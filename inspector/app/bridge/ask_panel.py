"""A question with a few large answers, and room for another one in words."""

from __future__ import annotations

from typing import Any

from kivy.properties import BooleanProperty, StringProperty
from kivy.uix.boxlayout import BoxLayout

from inspector.app.bridge.state import Choice
from inspector.app.widgets.choices import offer


class AskPanel(BoxLayout):
    """Asks before something is stored.

    Parameters
    ----------
    own_words : whether an answer can be written, too.
    """

    __events__ = ("on_answer", "on_close")

    question = StringProperty("")
    own_words = BooleanProperty(False)

    def __init__(self, **options: Any) -> None:
        super().__init__(**options)
        # Ids are weak; what is taken out of the tree at times is held here.
        self.field, self.written = self.ids.field.__self__, self.ids.written.__self__

    def on_answer(self, *_: Any) -> None:
        """An answer was given."""

    def on_close(self, *_: Any) -> None:
        """Nothing is to be stored."""

    def ask(self, question: str, answers: tuple[str, ...], *, own_words: bool) -> None:
        """Show a question."""
        self.question, self.own_words = question, own_words
        offer(self.ids.answers, [Choice(answer, answer.capitalize()) for answer in answers], self.answer)
        self.written.text = ""
        field = self.field
        if own_words and field.parent is None:
            self.ids.stack.add_widget(field)
        elif not own_words and field.parent is not None:
            self.ids.stack.remove_widget(field)

    def answer(self, text: str) -> None:
        """Give an answer."""
        if text.strip():
            self.dispatch("on_answer", text.strip())
