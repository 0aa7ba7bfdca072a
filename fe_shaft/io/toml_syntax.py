"""What is wrong with a text that is no TOML, in words that tell the remedy."""

from __future__ import annotations

import re

from fe_shaft.errors import quote

_AT = re.compile(r" \(at (?:line (\d+), column \d+|end of document)\)$")
_UNQUOTED_NUMBER = re.compile(
    r"""([\w.-]+)[ \t]*=[ \t]*(~?[ \t]*[+-]?[\d.,]+[ \t]*[^\s\d.,"'\]}#=][^,"\]}#=]*)(?![^,]*=)"""
)
_UNQUOTED_TILDE = re.compile(r"""([\w.-]+)[ \t]*=[ \t]*(~[^,"\]}#]*)""")
_UNQUOTED_WORD = re.compile(r"""([\w.-]+)[ \t]*=[ \t]*([A-Za-z_][^,"'\]}#]*)""")
_NO_VALUE = re.compile(r"""([\w.-]+)[ \t]*=[ \t]*(?:#.*)?$""")
_COLON = re.compile(r"""^[ \t]*([\w.-]+)[ \t]*:[ \t]*(.*)$""")
_TWICE = re.compile(r"Cannot declare \((.*)\) twice")

_SLIPS = ("Invalid value", "Expected newline", "Unclosed", "Expected '='", "Invalid initial character")

# Beginning of the parser's message -> our sentence.
_SENTENCES = {
    "Unterminated string": "a text has no closing quote. Close it.",
    "Expected \"'''\"": "a text in three quotes is not closed. Close it with '''.",
    'Expected \'"""\'': 'a text in three quotes is not closed. Close it with """.',
    "Unclosed array": "a list is not closed. Put a comma between its entries and ] at its end.",
    "Unclosed inline table": "a table in braces is not closed. Put commas between its keys and } at its end.",
    "Duplicate inline table key": "a key stands twice in the braces. Leave one out.",
    "Cannot overwrite a value": "a key stands twice in this table. Leave one out.",
    "Cannot redefine namespace": "a key stands twice in this table. Leave one out.",
    "Cannot mutate immutable namespace": "a table in braces cannot be continued. Write all its keys in the braces.",
    "Cannot define": "this key belongs to a table that is written elsewhere. Put all its keys in one place.",
    "Cannot declare": "this table is written twice. Put its keys together, or rename one.",
    "Unescaped '\\' in a string": "a backslash in a text. Write / in paths, or \\\\.",
    "Illegal character '\\n'": "a text has no closing quote. Close it.",
    "Illegal character": "a character that does not belong in a text (tab or control character). Leave it out.",
    "Found invalid character": "a control character. Leave it out.",
    "Expected '=' after a key": "a key without =. Write key = value.",
    "Expected ']' at the end of a table": "a heading is not closed. Write [group.name].",
    "Expected ']]' at the end of an array": "a heading is not closed. Write [group.name].",
    "Invalid initial character for a key part": "no key begins like this. Write key = value or [group.name].",
    "Invalid statement": "this line is no key and no heading. Write key = value or [group.name].",
    "Invalid hex value": "a wrong \\u code in a text. Leave it out.",
    "Escaped character is not a Unicode": "a wrong \\u code in a text. Leave it out.",
    "Invalid date or datetime": "a date that does not exist. Put it in quotes.",
    "Expected newline or end of document": "something follows the value. Put text in quotes, one key in a line.",
}


def syntax_fault(message: str, text: str) -> tuple[int, str]:
    """Line and sentence for a message of the TOML parser.

    Parameters
    ----------
    message : str
        Of ``tomllib.TOMLDecodeError``.
    text : str
        The whole text of the file.
    """
    lines = text.split("\n")
    match = _AT.search(message)
    number = int(match[1]) if match and match[1] else len(lines)
    plain = message[: match.start()] if match else message
    line = lines[min(number, len(lines)) - 1] if lines else ""
    if match and not match[1]:
        number = max((index for index, each in enumerate(lines, 1) if each.strip()), default=1)
    return number, _sentence(plain, line.strip())


def _sentence(message: str, line: str) -> str:
    if twice := _TWICE.match(message):
        names = ".".join(re.findall(r"'((?:[^'\\]|\\.)*)'", twice[1]))
        return f"[{names[:80]}] stands twice. A name is used once; rename one."
    may_be_slip = message.startswith(_SLIPS)
    if may_be_slip and len(line) < 1000 and (hint := _hint(line)):
        return hint
    for start, sentence in _SENTENCES.items():
        if message.startswith(start):
            return sentence
    return f"{quote(line)} cannot be read. Write key = value, with text and numbers with units in quotes."


def _hint(line: str) -> str | None:
    """Usual slips, seen in the line itself."""
    if line.count("{") > line.count("}"):
        return "a table in braces ends in its own line. Write all of { ... } in one line."
    if re.search(r",\s*\}", line):
        return "a comma stands before }. Leave it out."
    if colon := _COLON.match(line):
        return f"{colon[1]} is followed by a colon. Write {colon[1]} = ..."
    if empty := _NO_VALUE.search(line):
        return f'{empty[1]} has no value. Write {empty[1]} = "...", or leave it out.'
    for pattern in (_UNQUOTED_NUMBER, _UNQUOTED_TILDE, _UNQUOTED_WORD):
        for match in pattern.finditer(line):
            value = match[2].strip()
            if value not in ("true", "false") and not re.fullmatch(r"[\d.,+-]+([eE][+-]?\d*)?", value):
                return f'{value[:40]} stands without quotes. Write {match[1]} = "{value[:40]}".'
    return None
