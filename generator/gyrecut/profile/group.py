"""The base of every group of keys: pydantic's own errors in the words of the workshop."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from typing import TYPE_CHECKING, Any, ClassVar, Self, TypeAlias

from pydantic import BaseModel, ConfigDict, ValidationError, model_validator
from pydantic_core import InitErrorDetails, PydanticCustomError

from gyrecut.profile.problems import Code
from gyrecut.profile.scalars import MISTAKE, Described, closest, mistake, or_else

if TYPE_CHECKING:
    from pydantic import ModelWrapValidatorHandler
    from pydantic.fields import FieldInfo
    from pydantic_core import ErrorDetails

Mistakes: TypeAlias = Iterator[tuple[tuple[str | int, ...], PydanticCustomError]]


class Group(BaseModel):
    """A frozen group of keys that knows no others."""

    model_config = ConfigDict(extra="forbid", allow_inf_nan=False, frozen=True)

    line: ClassVar[str]
    """How the group looks in YAML, for messages."""

    @classmethod
    def rules(cls, given: Mapping[str, Any]) -> Mistakes:  # noqa: ARG003 - for the subclasses
        """Give the mistakes that take more than one key to see, from the data as written.

        They are looked for in what was written, not in the finished model, because there is
        none while any other value is wrong, and the user wants all mistakes in one run.
        """
        yield from ()

    @model_validator(mode="wrap")
    @classmethod
    def _in_plain_words(cls, given: Any, handler: ModelWrapValidatorHandler[Self]) -> Self:  # noqa: ANN401
        if isinstance(given, cls):
            return given
        if not isinstance(given, Mapping):
            code = Code.EMPTY if given is None else Code.WRONG_SHAPE
            what = "is empty" if given is None else "is one value where a group of keys belongs"
            if isinstance(given, list):
                what = "is a list where a group of keys belongs"
            raise mistake(code, what, allowed=cls._keys(), fix=f'write it as in "{cls.line}"')
        found: list[InitErrorDetails] = []
        model = None
        try:
            model = handler(given)
        except ValidationError as wrong:
            found = [cls._translated(error) for error in wrong.errors()]
        found += [
            InitErrorDetails(type=error, loc=where, input=None) for where, error in cls.rules(given)
        ]
        if found or model is None:
            raise ValidationError.from_exception_data(cls.__name__, found)
        return model

    @classmethod
    def _translated(cls, error: ErrorDetails) -> InitErrorDetails:
        if error["type"] == "missing":
            key = str(error["loc"][-1])
            words = missing(cls.fields_by_key()[key], key)
        elif error["type"] == "extra_forbidden":
            near = closest(error["loc"][-1], cls.fields_by_key())
            fix = or_else(near, "take the line out")
            words = mistake(
                Code.UNKNOWN_KEY,
                "is not a known key",
                allowed=cls._keys(),
                fix=fix,
                about_key=True,
            )
        else:
            # everything else was raised below as a `mistake`: carry it up as it is
            words = PydanticCustomError(MISTAKE, "{what}; allowed: {allowed}", error["ctx"])
        return InitErrorDetails(type=words, loc=error["loc"], input=None)

    @classmethod
    def _keys(cls) -> str:
        return "the keys " + ", ".join(cls.fields_by_key())

    @classmethod
    def fields_by_key(cls) -> dict[str, FieldInfo]:
        """Give the fields by the keys of the profile, which may be words that Python keeps."""
        return {field.alias or name: field for name, field in cls.model_fields.items()}


def missing(field: FieldInfo, name: str) -> PydanticCustomError:
    """Build the mistake for a key that has to be there and is not."""
    kind = field.annotation
    if isinstance(kind, type) and issubclass(kind, Group):
        allowed, line = kind._keys(), kind.line  # noqa: SLF001 - its own class
        return mistake(Code.MISSING, "is missing", allowed=allowed, fix=f'add it, as in "{line}"')
    rule = next(entry for entry in field.metadata if isinstance(entry, Described))
    return missing_value(rule, name)


def missing_value(rule: Described, name: str) -> PydanticCustomError:
    """Build the mistake for one value or list that has to be there and is not."""
    fix = f'add a line such as "{name}: {rule.example}"'
    return mistake(Code.MISSING, "is missing", allowed=rule.allowed, fix=fix)
