"""What the package shows is what is listed here, and all of it is documented."""

import inspect
import re

import ifcjoints
from ifcjoints import checking, errors

SURFACE = {
    "Action", "Audit", "Finding", "Joint", "Problem", "Result", "Settings", "Step",
    "audit", "check", "read_settings", "write_back",
}  # fmt: skip
BORDER = {
    "Case", "Check", "N", "NoOptions", "NotApplicable", "NotCheckable", "Quantity", "Subject", "Trace", "Verdict",
    "check", "greatest", "least", "root",
}  # fmt: skip


def test_the_surface_is_as_listed():
    assert sorted(ifcjoints.__all__) == sorted(SURFACE)


def test_the_plugin_border_is_as_listed():
    assert sorted(checking.__all__) == sorted(BORDER)


def undocumented(module):
    """Yield every class and function of a module's surface, and their public methods, that has no words of its own."""
    for name in module.__all__:
        thing = getattr(module, name)
        if not (inspect.isclass(thing) or inspect.isfunction(thing)):
            continue
        own = vars(thing).items() if inspect.isclass(thing) else ()
        methods = [(f"{name}.{key}", each) for key, each in own if not key.startswith("_") and inspect.isfunction(each)]
        yield from (key for key, each in [(name, thing), *methods] if not each.__doc__)


def test_everything_public_has_a_docstring_of_its_own():
    assert [*undocumented(ifcjoints), *undocumented(checking)] == []


def drawn_tree():
    """Return {class: the class it hangs from} as the docstring of errors.py draws it."""
    tree, above = {}, {}
    for line in errors.__doc__.splitlines():
        drawn = re.match(r"    ([│├└─ ]*)([A-Z]\w+)  ", line)
        if drawn:
            depth = len(drawn[1])
            above = {column: name for column, name in above.items() if column < depth}
            tree[drawn[2]] = above[max(above)] if above else "Exception"
            above[depth] = drawn[2]
    return tree


def test_the_errors_are_the_tree_that_is_drawn():
    family = {each for each in vars(errors).values() if inspect.isclass(each) and each.__module__ == errors.__name__}
    assert drawn_tree() == {each.__name__: each.__base__.__name__ for each in family}
