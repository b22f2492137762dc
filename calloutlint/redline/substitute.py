"""A changed copy of a frozen model: some of its parts replaced, everything else kept and shared."""

from collections.abc import Callable, Mapping
from dataclasses import fields, is_dataclass, replace
from typing import Any, TypeVar, cast

T = TypeVar("T")


class Removed:
    """Stands for a part that is taken out of the tuple it stands in."""


def substitute(node: T, changes: Mapping[int, object]) -> T:
    """The same tree with each part whose `id` is in `changes` replaced; a part changed to `Removed` goes."""
    if id(node) in changes:
        return cast(T, changes[id(node)])
    return cast(T, _with_children(node, lambda child: substitute(child, changes)))


def rebuild(node: T, change: Callable[[Any], Any]) -> T:
    """The same tree with `change` applied to every model object in it, the innermost first."""
    rebuilt = _with_children(node, lambda child: rebuild(child, change))
    return change(rebuilt) if is_dataclass(rebuilt) else rebuilt  # type: ignore[no-any-return]


def _with_children(node: Any, change: Callable[[Any], Any]) -> Any:
    if isinstance(node, tuple):
        return _changed_tuple(node, change)
    if not is_dataclass(node) or isinstance(node, type):
        return node
    old = {field.name: getattr(node, field.name) for field in fields(node)}
    new = {name: change(value) for name, value in old.items()}
    moved = {name: value for name, value in new.items() if value is not old[name]}
    return replace(node, **moved) if moved else node


def _changed_tuple(node: tuple[Any, ...], change: Callable[[Any], Any]) -> tuple[Any, ...]:
    changed = [change(item) for item in node]
    if all(new is old for new, old in zip(changed, node, strict=True)):
        return node
    return tuple(item for item in changed if item is not Removed)
