"""Every error that navcore raises on purpose.

    NavError
    ├── ParseError        a written value that can't be read (also a ValueError)
    ├── RangeError        a number outside what a function takes (also a ValueError)
    ├── NoAnswerError     the question is sound but has no answer; says why
    ├── ConvergenceError  an iteration did not settle
    ├── EditError         an edit that this plan does not allow
    └── PlanFileError     a file that can't be read in full; carries every problem

Each message says what is wrong, where, what is allowed and what to do.
"""

from __future__ import annotations

from dataclasses import dataclass


class NavError(Exception):
    """Base of every error that navcore raises on purpose."""


class ParseError(NavError, ValueError):
    """A written value that can't be read.

    Attributes:
        text: The whole text as typed.
        start: Index of the first character that is wrong.
        end: Index after the last character that is wrong; start == end where something is missing.
        reason: What is wrong.
        advice: What to type.
    """

    def __init__(self, text: str, span: tuple[int, int], reason: str, advice: str) -> None:
        self.text = text
        self.start, self.end = span
        self.reason = reason
        self.advice = advice
        super().__init__(f"{reason}; {advice}")


class RangeError(NavError, ValueError):
    """A number outside what a function takes.

    Attributes:
        name: The argument.
        value: What was given.
        allowed: What is taken, in words with its unit.
    """

    def __init__(self, name: str, value: float, allowed: str) -> None:
        self.name = name
        self.value = value
        self.allowed = allowed
        super().__init__(f"{name} is {value!r}; allowed: {allowed}")


class NoAnswerError(NavError):
    """The question is sound but has no answer; the message says why."""


class ConvergenceError(NavError):
    """An iteration did not settle within its limit."""


class EditError(NavError):
    """An edit that this plan does not allow; the message says what is."""


@dataclass(frozen=True, slots=True)
class Problem:
    """One thing in a file that can't be read.

    Attributes:
        line: Line in the file, from 1.
        column: Column in the line, from 1, in characters.
        what: What was found.
        allowed: What is allowed there.
        advice: What to type.
    """

    line: int
    column: int
    what: str
    allowed: str
    advice: str

    def __str__(self) -> str:
        return f"{self.line}:{self.column}: {self.what}; allowed: {self.allowed}; {self.advice}"


class PlanFileError(NavError):
    """A plan file that can't be read in full.

    Attributes:
        path: The file, as it was named.
        problems: Every problem found, in file order.
    """

    def __init__(self, path: str, problems: tuple[Problem, ...]) -> None:
        self.path = path
        self.problems = problems
        super().__init__("\n".join(f"{path}:{problem}" for problem in problems))
