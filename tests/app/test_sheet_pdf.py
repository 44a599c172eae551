"""The sizing sheet as a PDF, read back."""

from __future__ import annotations

import re
from pathlib import Path

import pytest
from pypdf import PdfReader
from PySide6.QtWidgets import QApplication

from headfall.files import FileError
from headfall.quantities import display_units
from headfall.resources import read_resource
from headfall.sheet import build_sheet
from headfall_app.paint.fonts import load_fonts
from headfall_app.paint.scene import scene_of
from headfall_app.paint.theme import theme
from headfall_app.print.page import page_of
from headfall_app.print.pagination import Layout
from headfall_app.print.sheet_pdf import best_layout, write_sheet_pdf
from tests.core.sheet_cases import CASES, LONG_TITLE, answers_to

PAPERS = {"a4": (595, 842), "letter": (612, 792)}


def words(text: str) -> str:
    """The text with every kind of space as one space."""
    return " ".join(text.split())


def unspaced(text: str) -> str:
    """The text without any space."""
    return "".join(text.split())


@pytest.fixture
def read(application: QApplication, tmp_path: Path):
    """Write the sheet of a case and read its pages back."""

    def written(name: str, paper: str = "a4") -> PdfReader:
        path = tmp_path / f"{name} {paper}.pdf"
        write_sheet_pdf(answers_to(name), path, paper, fingerprint="7c1e 40b2 9ad3")
        return PdfReader(path)

    return written


def layout_of(name: str, paper: str) -> Layout:
    load_fonts()
    answers = answers_to(name)
    sheet = build_sheet(answers, version="0.1.0", fingerprint="7c1e 40b2 9ad3")
    scene = scene_of(answers, display_units(answers.case.units or "metric"))
    return best_layout(sheet, scene, page_of(paper), theme("paper"))


def test_the_answer_and_the_heading_can_be_found_in_the_text(read) -> None:
    text = words(read("drum with inflow").pages[0].extract_text())
    for wanted in ("Sizing sheet", "Rinse drum", "T-12", "2031-04-02", "A. Example", "Quillhaven batch house"):
        assert wanted in text
    assert "36 min 53 s" in text
    assert "35 min 07 s to 38 min 51 s over coefficients 0.59 to 0.63" in text
    assert "inputs 7c1e 40b2 9ad3" in text
    assert "5600 mm" in text
    assert re.search(r"scale 1 : \d+", text)


@pytest.mark.parametrize("paper", list(PAPERS))
def test_each_page_carries_its_number_the_tag_and_the_revision(read, paper: str) -> None:
    pages = read("drum with inflow", paper).pages
    assert len(pages) >= 3
    for number, page in enumerate(pages, 1):
        text = words(page.extract_text())
        assert f"page {number} of {len(pages)}" in text
        assert "T-12" in text
        assert "rev C" in text
        assert "Decimal mark: point" in text


@pytest.mark.parametrize(("paper", "size"), list(PAPERS.items()))
def test_the_paper_is_the_one_asked_for(read, paper: str, size: tuple[int, int]) -> None:
    for page in read("cylinder", paper).pages:
        assert (round(page.mediabox.width), round(page.mediabox.height)) == size


@pytest.mark.parametrize("name", ["drum with inflow", "never reached", "overflows", "six outlets"])
def test_every_check_and_every_source_is_printed(read, name: str) -> None:
    text = words(" ".join(page.extract_text() for page in read(name).pages))
    for finding in answers_to(name).findings:
        said = finding.text if finding.grade.word != "not checked" else f"needs {finding.needs}"
        assert words(finding.subject) in text
        assert unspaced(said) in unspaced(text)  # a change of font is read back as a space
    assert "The formation of a dip on the surface of a liquid draining from a tank" in text
    assert set(re.findall(r"\[(\d+)\]", text)) == {
        str(n) for n in range(1, 1 + len(set(re.findall(r"\[(\d+)\]", text))))
    }
    assert read_resource("sources.json")["unwin_1911"]["title"] in text


def test_the_last_page_has_the_three_signatures_at_its_foot(read) -> None:
    pages = read("cylinder").pages
    for number, page in enumerate(pages, 1):
        text = page.extract_text()
        for word in ("Prepared", "name, signature"):
            assert (word in text) == (number == len(pages))


def test_nothing_is_a_bitmap_and_fonts_are_embedded(read) -> None:
    reader = read("drum with inflow")
    names = set()
    for page in reader.pages:
        assert list(page.images) == []
        for entry in page["/Resources"]["/Font"].values():
            names.add(entry.get_object()["/BaseFont"])
    assert names
    assert all("SourceSansPro" in name for name in names)


def test_a_word_with_ligatures_in_it_can_be_searched_for(read) -> None:
    text = words(" ".join(page.extract_text() for page in read("least typed").pages))
    assert "coefficient" in text
    assert "overflow" in text


def test_two_words_can_be_searched_for_with_a_plain_space(read) -> None:
    text = read("drum with inflow").pages[0].extract_text()
    assert "Sizing sheet" in text
    assert "36 min 53 s" in text
    assert "\t" not in text


def test_a_long_title_and_long_remarks_are_printed_whole(read) -> None:
    text = words(read("six outlets").pages[0].extract_text())
    assert words(LONG_TITLE) in text
    assert text.count("the time is part of the wash plan") == 25


def test_the_file_names_its_sheet(read) -> None:
    assert read("cylinder").metadata.title == "Sizing sheet T-12 Rinse drum"


@pytest.mark.parametrize("paper", list(PAPERS))
@pytest.mark.parametrize("name", list(CASES))
def test_pages_are_full_and_nothing_runs_over_their_foot(application: QApplication, name: str, paper: str) -> None:
    layout, page = layout_of(name, paper), page_of(paper)
    assert all(0.80 < part <= 1.0001 for part in layout.fill[:-1])
    assert 0.30 < layout.fill[-1] <= 1.0001
    for placed in layout.pages:
        ends = [strip.top + strip.height for strip in placed]
        assert all(end <= after.top + 0.5 for end, after in zip(ends[:-1], placed[1:], strict=True))
        assert ends[-1] <= page.body_bottom + 0.5
        assert not placed[-1].strip.keeps


def test_a_table_carries_its_head_over_to_the_next_page(read) -> None:
    pages = [words(page.extract_text()) for page in read("six outlets").pages]
    heads = [text.count("What was found, what it rests on, what to do") for text in pages]
    assert sum(heads) >= 2
    assert max(heads) == 1


def test_an_existing_file_is_replaced_and_no_other_is_left(application: QApplication, tmp_path: Path) -> None:
    path = tmp_path / "sheet.pdf"
    path.write_bytes(b"old")
    write_sheet_pdf(answers_to("cylinder"), path, fingerprint="x")
    assert path.read_bytes().startswith(b"%PDF")
    assert [file.name for file in tmp_path.iterdir()] == ["sheet.pdf"]


def test_a_folder_that_is_not_there_is_told_and_a_strange_paper_too(application: QApplication, tmp_path: Path) -> None:
    with pytest.raises(FileError):
        write_sheet_pdf(answers_to("cylinder"), tmp_path / "none" / "sheet.pdf", fingerprint="x")
    with pytest.raises(ValueError, match="there are a4 and letter"):
        write_sheet_pdf(answers_to("cylinder"), tmp_path / "sheet.pdf", "a3", fingerprint="x")
    assert list(tmp_path.iterdir()) == []
