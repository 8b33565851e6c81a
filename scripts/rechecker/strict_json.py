"""JSON text (RFC 8259) read strictly, and its canonical form (RFC 8785) for what occurs in certificates."""

import json
import re

DEEPEST = 32
LARGEST_COUNT = 2**53 - 1


class Fault(Exception):
    """A file that cannot be judged: malformed, of a newer version, or unreadable."""

    def __init__(self, message, kind="malformed"):
        super().__init__(message)
        self.kind = kind


class Approximate(str):
    """A number that is no plain integer. Only `provenance` may have one; everything else refuses its type."""


def _integer(text):
    return int(text) if len(text) <= 20 and text != "-0" else Approximate(text)


def _constant(text):
    raise Fault(f"{text} is not JSON")


def _without_duplicates(pairs):
    members = dict(pairs)
    if len(members) != len(pairs):
        seen = set()
        twice = next(key for key, _ in pairs if key in seen or seen.add(key))
        raise Fault(f"the key {shown(twice)} occurs twice in an object")
    return members


_LONE_SURROGATE = re.compile("[\ud800-\udfff]")


def _look_through(value):
    """Nesting and lone surrogates, level by level: no recursion."""
    level, depth = [value], 0
    while level:
        containers = [v for v in level if isinstance(v, (dict, list))]
        depth += bool(containers)
        if depth > DEEPEST:
            raise Fault(f"arrays and objects are nested deeper than {DEEPEST}")
        strings = [v for v in level if isinstance(v, str)] + [k for v in containers if isinstance(v, dict) for k in v]
        if any(_LONE_SURROGATE.search(text) for text in strings):
            raise Fault("a string has half a surrogate pair")
        level = [inner for v in containers for inner in (v.values() if isinstance(v, dict) else v)]


def read_json(data):
    """The value of the bytes: objects, arrays, strings, int, bool, None; other numbers as Approximate."""
    try:
        value = json.loads(data.decode("utf-8"), object_pairs_hook=_without_duplicates, parse_int=_integer,
                           parse_float=Approximate, parse_constant=_constant)
    except UnicodeDecodeError as error:
        raise Fault(f"byte {error.start} is not UTF-8") from None
    except RecursionError:
        raise Fault(f"arrays and objects are nested deeper than {DEEPEST}") from None
    except ValueError as error:
        raise Fault(f"it is not JSON: {error}") from None
    _look_through(value)
    return value


def canonical(value):
    return json.dumps(value, ensure_ascii=False, sort_keys=True, separators=(",", ":")).encode("utf-8")


def shown(text, most=60):
    safe = "".join(c if " " <= c <= "~" else "?" for c in text[:most])
    return f"'{safe}{'...' if len(text) > most else ''}'"


# Members of a certificate's objects, each refused with the JSON pointer of its place.


def fault_at(at, reason):
    return Fault(f"{at or 'the document'}: {reason}")


def check_keys(value, at, required, optional=()):
    if type(value) is not dict:
        raise fault_at(at, f"an object should stand here, with the keys {', '.join((*required, *optional))}")
    for key in value:
        if key not in required and key not in optional:
            raise fault_at(at, f"unknown key {shown(key)}")
    for key in required:
        if key not in value:
            raise fault_at(at, f"the key '{key}' is missing")


def text_of(value, at):
    if type(value) is not str:
        raise fault_at(at, "a string should stand here")
    return value


def count_of(value, at, least, most=LARGEST_COUNT):
    if type(value) is not int or not least <= value <= most:
        raise fault_at(at, f"an integer from {least} to {most} should stand here")
    return value
