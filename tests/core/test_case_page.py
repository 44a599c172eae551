"""The page on the case file names every key and every word that a file may hold."""

from __future__ import annotations

import json
import re
from pathlib import Path

import pytest

from headfall.case.attributes import attributes_of, discriminator
from headfall.case.model import Case
from headfall.case.reading import read_case_data

PAGE = (Path(__file__).parents[2] / "resources" / "app" / "pages" / "case-format.md").read_text(encoding="utf-8")
FENCED = re.compile(r"```json\n(.*?)```", re.DOTALL)


def parts() -> list[type]:
    """Return every kind of part that a case may hold."""
    found: list[type] = [Case]
    for part in found:
        found += [kind for item in attributes_of(part).values() for kind in item.variants if kind not in found]
    return list(dict.fromkeys(found))


@pytest.mark.parametrize("part", parts(), ids=lambda part: part.__name__)
def test_every_key_and_word_stands_on_the_page(part: type) -> None:
    inline = re.findall(r"`([^`]+)`", FENCED.sub("", PAGE))
    said = set(re.findall(r"[A-Za-z_0-9]+", " ".join(inline)))
    wanted = set(attributes_of(part))
    for attribute in attributes_of(part).values():
        wanted.update(attribute.metadata.get("choices", ()))
    word = discriminator(part)
    if word is not None:
        wanted.update(word)
    assert wanted - said == set()


def test_the_smallest_case_on_the_page_is_one() -> None:
    blocks = [json.loads(block) for block in FENCED.findall(PAGE)]
    smallest, table = blocks
    assert read_case_data(smallest).levels.start.text == "2.8 m"
    assert read_case_data({**smallest, "vessel": table}).vessel.shape == "table"
