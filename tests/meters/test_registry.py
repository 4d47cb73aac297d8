"""The registry against the folder of the modules and the profiles."""

from pathlib import Path

import pytest

from specsheet import meters, packs
from specsheet.meters import registry

#: modules of the folder that are no families
SHARED = {"__init__", "family", "registry"}


def test_every_module_is_registered():
    folder = Path(meters.__file__).parent
    modules = {path.stem for path in folder.glob("*.py")} - SHARED
    assert modules == {name.rpartition(".")[2] for name in registry.MODULES.values()}


@pytest.mark.parametrize("key", sorted(registry.MODULES))
def test_family_bears_its_key_and_has_a_profile(key):
    family = registry.family(key)
    assert family is not None
    assert family.key == key
    assert key in packs.family_keys()
    assert packs.profile(key).key == key


def test_unknown_family_is_none():
    assert registry.family("water_clock") is None
