"""The base of every noun of the model: frozen words with one sentence for each mistake, all of them at once.

A noun is a pydantic model. Its fields are the keys of the model file, each with a kind (see `kinds`) that checks the
raw value and says its own sentence. What pydantic itself finds (keys missing or unknown) is put into our words here.
A noun in which something is wrong can still be salvaged: what is readable serves to check the rest of the model, so
that a file tells all its mistakes at once.
"""

from collections.abc import Iterator, Mapping
from inspect import Parameter, Signature
from typing import TYPE_CHECKING, Annotated, Any, ClassVar, NamedTuple, Self, get_origin

from pydantic import ConfigDict, Field, TypeAdapter, ValidationError, ValidationInfo, model_validator
from pydantic_core import InitErrorDetails

from fe_shaft.errors import ModelError
from fe_shaft.model.kinds import Choice, Text, shown, thing
from fe_shaft.model.plain import as_toml, joined
from fe_shaft.model.refusal import problem, refuse, sentence_of
from fe_shaft.model.symbols import meant_key, unknown_key
from fe_shaft.units import Value

if TYPE_CHECKING:
    # Type checkers see a plain class: its one constructor takes the words of the file in any accepted form, whereas
    # the fields are what validation makes of them.
    from pydantic.fields import FieldInfo

    class BaseModel:
        """What is used of pydantic's class of that name."""

        model_fields: ClassVar[dict[str, FieldInfo]]
        model_fields_set: set[str]
        __signature__: ClassVar[Signature]
        __pydantic_validator__: Any

        @classmethod
        def model_construct(cls, _fields_set: set[str] | None = None, **values: Any) -> Self:
            """Make a noun without validation."""
else:
    from pydantic import BaseModel


_AT_THE_END = ("range_check", "source")  # of a table, where it is written back


class Fault(NamedTuple):
    """One mistake: the path of its value, from the noun in which it was found, and the sentence."""

    path: tuple[str | int, ...]
    sentence: str


class Words(BaseModel):
    """Base of all nouns; frozen, and closed to keys it does not know."""

    model_config = ConfigDict(frozen=True, extra="forbid", arbitrary_types_allowed=True, defer_build=True)
    positional: ClassVar[tuple[str, ...]] = ()

    range_check: Annotated[str | None, Choice("off")] = Field(
        default=None,
        description="`off` lets values pass in this table that look like slips of units.",
        examples=["off"],
    )
    source: Annotated[str | None, Text()] = Field(
        default=None, description="Where the figures come from; printed with them.", examples=["measured on the bench"]
    )

    def __init__(self, *args: Any, **words: Any) -> None:
        if len(args) > len(self.positional):
            several = ", ".join(self.positional) or "nothing"
            what = f"{len(args)} values without a key; only {several} may stand without. Write key = value."
            raise ModelError(problem(type(self).__name__, what))
        for key, value in zip(self.positional, args, strict=False):
            if key in words:
                raise ModelError(problem(type(self).__name__, f"{key} is given twice. Leave one out."))
            words[key] = value
        try:
            self.__pydantic_validator__.validate_python(words, self_instance=self, context=_context())
        except ValidationError as error:
            faults = faults_of(error)
        else:
            return
        raise ModelError([problem(self.place_of(words, fault.path), fault.sentence) for fault in faults])

    __init__.__pydantic_base_init__ = True  # type: ignore[attr-defined] # nested tables are validated natively

    @classmethod
    def __pydantic_init_subclass__(cls, **options: Any) -> None:
        """Show the words to `help`, to notebooks and to `inspect`."""
        fields = cls.model_fields
        default = {key: Parameter.empty if field.is_required() else field.default for key, field in fields.items()}
        first = [key for key in cls.positional if key in fields]
        words = [Parameter(key, Parameter.POSITIONAL_OR_KEYWORD, default=default[key]) for key in first]
        words += [Parameter(key, Parameter.KEYWORD_ONLY, default=default[key]) for key in fields if key not in first]
        cls.__signature__ = Signature(words)

    @classmethod
    def __pydantic_on_complete__(cls) -> None:
        """The same again, since pydantic writes its own signature when it has built the validator."""
        cls.__pydantic_init_subclass__()

    def __setattr__(self, key: str, value: object) -> None:
        place = self.place_of(self.__dict__, (key,))
        raise ModelError(problem(place, "a part of a model does not change. Make a new one."))

    @model_validator(mode="wrap")
    @classmethod
    def _all_at_once(cls, raw: Any, handler: Any, info: ValidationInfo) -> Any:
        """Validate, then check what keys mean together; on mistakes, both kinds are told."""
        if isinstance(raw, cls):
            return raw
        if not isinstance(raw, Mapping):
            raise refuse(f"{shown(raw)} is {thing(raw)}, not a table. {cls.remedy()}".rstrip())
        table = raw
        if any(value is None for value in raw.values()):
            table = {key: value for key, value in raw.items() if value is not None}
        shared: Any = info.context
        around = shared["loose"]
        shared["loose"] = around or table.get("range_check") == "off"
        try:
            self = handler(table)
            faults = list(self.faults_together())
        except ValidationError as error:
            faults = cls._every_fault(table, error, shared, id(raw))
        finally:
            shared["loose"] = around
        if faults:
            details = [InitErrorDetails(type=refuse(told), loc=path, input=None) for path, told in faults]
            raise ValidationError.from_exception_data(cls.__name__, details)
        return self

    @classmethod
    def _every_fault(cls, table: Mapping[str, Any], error: ValidationError, context: Any, key: int) -> list[Fault]:
        """Faults of single keys, then those that the readable keys make together; what is readable is kept."""
        meant = cls._meant(table)
        found = [
            one for one in error.errors(include_url=False) if one["type"] != "missing" or one["loc"][0] not in meant
        ]
        rest = cls._salvage(table, {one["loc"][0] for one in found if one["loc"]}, context)
        context["salvaged"][key] = rest
        told = [cls._told(one["type"], one["loc"], one["input"], one.get("ctx")) for one in found]
        return [*told, *rest.faults_together()]

    def faults_together(self) -> Iterator[Fault]:
        """Mistakes that only several keys together make; keys that could not be read are None here."""
        return iter(())

    @classmethod
    def remedy(cls) -> str:
        """What to write instead of something that is no table."""
        keys = [key for key, field in cls.model_fields.items() if field.is_required() and key != "name"]
        keys = keys or [
            key for key, field in cls.model_fields.items() if field.examples and key not in Words.model_fields
        ]
        return f"Write {{ {', '.join(example_of(cls, key) for key in keys[:2])} }}." if keys else ""

    @classmethod
    def place_of(cls, words: Mapping[str, Any], path: tuple[str | int, ...]) -> str:
        """Address of a value inside this noun, as a script sees it."""
        name = words.get("name")
        head = name if isinstance(name, str) and name else cls.__name__.lower()
        return joined([head, *path])

    @property
    def given(self) -> set[str]:
        """Keys that were written, readable or not, known or not."""
        return self.model_fields_set

    # ---- salvaging

    @classmethod
    def attempt(cls, raw: object) -> tuple[Self, list[Fault]]:
        """The noun and all its mistakes; with mistakes, unreadable keys are None.

        Parameters
        ----------
        raw : object
            A table of the model file, or the noun itself.
        """
        context = _context()
        try:
            made: Self = cls.__pydantic_validator__.validate_python(raw, context=context)
        except ValidationError as error:
            salvaged = context["salvaged"].get(id(raw))
            return salvaged or cls._salvage(raw if isinstance(raw, Mapping) else {}, set(), context), faults_of(error)
        return made, []

    @classmethod
    def _salvage(cls, raw: Mapping[str, Any], bad: set[str | int], context: Any) -> Self:
        """What can be read of a table."""
        values = {}
        for key, field in cls.model_fields.items():
            if key not in raw or raw[key] is None:
                values[key] = None if field.is_required() else field.get_default(call_default_factory=True)
            else:
                values[key] = _readable(cls, key, raw[key], context, key in bad)
        return cls.model_construct({*map(str, raw), *cls._meant(raw)}, **values)

    @classmethod
    def table_keys(cls) -> list[str]:
        """Keys of its table in a model file."""
        return [key for key in cls.model_fields if key != "name" or cls.named_inside]

    @classmethod
    def _meant(cls, raw: Mapping[str, Any]) -> set[str]:
        """Keys that unknown keys stand for: they are told once, not as missing as well."""
        strange = [key for key in raw if isinstance(key, str) and key not in cls.model_fields]
        return {meant for key in strange if (meant := meant_key(key, cls.table_keys()))}

    @classmethod
    def _told(cls, kind: str, path: tuple[str | int, ...], raw: object, context: Any) -> Fault:
        """One finding of pydantic in our words."""
        key = str(path[0]) if path else ""
        if kind == "said":
            return Fault(path, context["sentence"])
        if kind == "missing":
            return Fault(path, f"{key} is not written. Write {example_of(cls, key)}.")
        if kind == "extra_forbidden":
            known = {each: example_of(cls, each) for each in cls.table_keys()}
            return Fault(path, unknown_key(key, cls.__name__, known))
        if kind == "tuple_type":
            return Fault(path, f"{shown(raw)} is {thing(raw)}, not a list. Write {example_of(cls, key)}.")
        if kind == "invalid_key":
            return Fault(path, f"{key} is not a key: keys are text. Leave it out.")
        return Fault(path, f"{shown(raw)} cannot be read here. Write {example_of(cls, key)}.")

    # ---- back to a table

    def to_table(self) -> dict[str, Any]:
        """The words as a model file states them, in the user's own text; defaults are left out."""
        return {key: written(value) for key, value in tables_of(self).items()}

    named_inside: ClassVar[bool] = False  # whether the name stands inside the table, not in its heading


class Named(Words):
    """A noun with a name, which is its address; the first argument in a script."""

    positional: ClassVar[tuple[str, ...]] = ("name",)
    if TYPE_CHECKING:
        name: Any  # text; a segment's may be None


def written(value: Any) -> Any:
    """A validated value as a model file states it."""
    if isinstance(value, Words):
        return value.to_table()
    if isinstance(value, Value):
        return value.written()
    if isinstance(value, tuple | list):
        return [written(each) for each in value]
    if isinstance(value, Mapping):
        return {key: written(each) for key, each in value.items()}
    return getattr(value, "text", value)


def example_of(cls: type[Words], key: str) -> str:
    """``key = example``, as a model file would have it."""
    field = cls.model_fields.get(key)
    example = field.examples[0] if field is not None and field.examples else ...
    return f"{key} = {as_toml(example)}"


def faults_of(error: ValidationError) -> list[Fault]:
    """The mistakes that a validation error carries."""
    return [
        Fault(tuple(one["loc"]), sentence_of(one.get("ctx"), one["type"]))
        for one in error.errors(include_url=False, include_input=False)
    ]


def _context() -> dict[str, Any]:
    """What nouns inside each other share: whether slips of units pass, and what was salvaged, by table."""
    return {"loose": False, "salvaged": {}}


def _readable(cls: type[Words], key: str, raw: object, context: Any, bad: bool) -> Any:
    """The value of one key, or what can be read of it."""
    if key == "name" and isinstance(raw, str):
        return raw
    if not bad:
        return _adapter(cls, key).validate_python(raw, context=context)
    inner = inner_noun(cls, key)
    if inner is None:
        return None
    if not holds_list(cls, key):
        return _salvaged(inner, raw, context) if isinstance(raw, Mapping) else None
    return tuple(_salvaged(inner, each, context) for each in raw) if isinstance(raw, list | tuple) else None


def _salvaged(noun: type[Words], raw: object, context: Any) -> Words:
    """What was read of a table before, or is to be read now."""
    return context["salvaged"].get(id(raw)) or noun.attempt(raw)[0]


_ADAPTERS: dict[tuple[str, str], TypeAdapter[Any]] = {}  # by noun and key; made for mistakes only


def _adapter(cls: type[Words], key: str) -> TypeAdapter[Any]:
    """What reads one key alone."""
    known = _ADAPTERS.get((cls.__name__, key))
    if known is None:
        field = cls.model_fields[key]
        annotation: Any = field.annotation
        for kind in field.metadata:
            annotation = Annotated[annotation, kind]
        known = _ADAPTERS[cls.__name__, key] = TypeAdapter(annotation)
    return known


def inner_noun(cls: type[Words], key: str) -> type[Words] | None:
    """The noun that a key holds, alone or in a list."""
    return next((one for one in _inside(cls, key) if isinstance(one, type) and issubclass(one, Words)), None)


def holds_list(cls: type[Words], key: str) -> bool:
    """Whether a key holds a list."""
    return any(get_origin(one) is tuple for one in _inside(cls, key))


def _inside(cls: type[Words], key: str) -> Iterator[Any]:
    """The annotation of a key and everything it is made of."""
    waiting: list[Any] = [cls.model_fields[key].annotation]
    while waiting:
        yield (one := waiting.pop())
        waiting += getattr(one, "__args__", ())


def tables_of(noun: object) -> dict[str, Any]:
    """A noun or table as a table of its own whose values may be nouns still."""
    if isinstance(noun, Words):
        keys = (*(key for key in type(noun).model_fields if key not in _AT_THE_END), *_AT_THE_END)
        told = [key for key in keys if key in noun.given and (key != "name" or noun.named_inside)]
        return {key: value for key in told if (value := getattr(noun, key)) is not None}
    return dict(noun) if isinstance(noun, Mapping) else {}
