"""What the sizing sheet says."""

from __future__ import annotations

import pytest

from headfall.checks.finding import Grade
from headfall.quantities import display_units
from headfall.resources import read_resource
from headfall.sheet import AnswerBox, Paragraph, Section, Sheet, Table, build_sheet
from headfall.sheet.marks import heavy, lowered, raised, runs, unmarked
from headfall.sheet.numbers import bound, coefficient, figures, read_figure, rounded, sentence
from tests.core.sheet_cases import CASES, LONG_TITLE, answers_to


def sheet_of(name: str) -> Sheet:
    return build_sheet(answers_to(name), version="0.1.0", fingerprint="7c1e 40b2 9ad3")


def box(name: str) -> AnswerBox:
    part = sheet_of(name).section(1).parts[0]
    assert isinstance(part, AnswerBox)
    return part


def table(section: Section) -> Table:
    return next(part for part in section.parts if isinstance(part, Table))


def spoken(text: str) -> str:
    return unmarked(text).replace("\u00a0", " ")


def test_the_drum_answers_in_one_line_with_range_requirement_and_next_size() -> None:
    found = box("drum with inflow")
    assert spoken(found.question) == "How long from 1.800 m to 0.100 m, with 3.00 L/s flowing in?"
    assert spoken(found.figure) == "36 min 53 s"
    assert spoken(found.beside) == "35 min 07 s to 38 min 51 s over coefficients 0.59 to 0.63"
    assert spoken(found.lines[0]).startswith("Wanted: 25 min or less. Not met with 80 mm.")
    assert "100 mm, takes 20 min 02 s (19 min 15 s to 20 min 53 s)" in spoken(found.lines[0])


@pytest.mark.parametrize(
    ("name", "figure", "words"),
    [
        ("never reached", "never reached", "it settles at 0.347 m (0.325 m to 0.371 m), with 2.17 m³ still"),
        ("heel", "never reached", "it settles at 0.260 m, with 1.18 m³ still in the vessel"),
        ("overflows", "overflows after 2 min 11 s", "1 min 59 s to 2 min 24 s over coefficients 0.59 to 0.63"),
        ("fills", "26 min 43 s", "25 min 32 s to 28 min 02 s"),
    ],
)
def test_what_is_no_drain_time_is_explained(name: str, figure: str, words: str) -> None:
    found = box(name)
    assert spoken(found.figure) == figure
    assert spoken(found.beside).startswith(words)


def test_a_stop_never_reached_is_said_to_fail_the_requirement_with_its_reason() -> None:
    lines = [spoken(line) for line in box("never reached").lines]
    assert lines[0].startswith("Wanted: 25 min or less. Not met with 80 mm: the stop level is not reached.")
    assert any("settles at 0.347 m" in line for line in lines)


def test_met_over_the_whole_range_names_what_would_just_do() -> None:
    line = spoken(box("cone").lines[0])
    assert line.startswith("Wanted: 10 min or less. Met with 60 mm over the whole range.")
    assert "A bore of 56.3 mm would do at the typical coefficient" in line


@pytest.mark.parametrize("name", list(CASES))
def test_every_section_stands_in_its_place(name: str) -> None:
    sheet = sheet_of(name)
    assert [section.number for section in sheet.sections] == list(range(1, 11))
    assert all(section.parts for section in sheet.sections)
    for part in (part for section in sheet.sections for part in section.parts if isinstance(part, Table)):
        assert part.rows
        assert {len(row) for row in part.rows} == {len(part.columns)}


@pytest.mark.parametrize("name", list(CASES))
def test_every_finding_has_its_row_and_what_was_not_checked_says_what_it_needs(name: str) -> None:
    findings, rows = answers_to(name).findings, table(sheet_of(name).section(7)).rows
    assert len(rows) == len(findings)
    for finding, row in zip(findings, rows, strict=True):
        assert unmarked(row[0]) == finding.grade.word
        assert finding.subject in row[1]
        if finding.grade == Grade.NOT_CHECKED and finding.needs:
            assert f"needs {finding.needs}" in row[4]
        else:
            assert spoken(finding.text) in spoken(row[4])


@pytest.mark.parametrize("name", list(CASES))
def test_every_source_cited_is_listed_with_its_status(name: str) -> None:
    sheet = sheet_of(name)
    listed = table(sheet.section(10)).rows
    numbers = [row[0] for row in listed]
    assert numbers == [f"[{number}]" for number in range(1, len(numbers) + 1)]
    assert {row[2] for row in listed} <= {source["status"] for source in read_resource("sources.json").values()}
    cited = " ".join(cell for row in table(sheet.section(7)).rows for cell in row)
    assert all(f"[{number}]" in cited or number < 9 for number in range(1, len(numbers) + 1))


def test_inputs_stand_as_typed_beside_their_si_values_and_defaults_are_marked() -> None:
    rows = {row[0]: row for row in table(sheet_of("US units").section(3)).rows}
    assert rows["Inside diameter"][1:4] == ("8 ft", "2.4384\u00a0m", "as typed")
    assert rows["Start level"][1] == "9 ft 2 1/8 in"
    assert rows["Outlet 1, diameter"][1:3] == ("2 in", "0.0508\u00a0m")
    assert rows["Gravity"][3] == "default"
    assert rows["Temperature"][1:4] == ("–", "293.15 K", "default")
    assert rows["Inflow, steady"][1] == "10 US gal/min"
    assert rows["Joint efficiency"][1:4] == ("–", "1", "default")


def test_an_undeclared_headspace_is_a_default_and_an_assumption_to_confirm() -> None:
    sheet = sheet_of("least typed")
    rows = {row[0]: row for row in table(sheet.section(3)).rows}
    assert rows["Headspace"][1:4] == ("–", "", "default")
    assert rows["Headspace"][4].startswith("not declared")
    register = table(sheet.section(9))
    assert any("not declared" in row[1] for row in register.rows)
    assert all(row[-1] == "" for row in register.rows)
    assert [row[0] for row in register.rows] == [str(number) for number in range(1, len(register.rows) + 1)]


def test_the_results_table_ends_at_the_main_answer() -> None:
    answers = answers_to("drum with inflow")
    rows = table(sheet_of("drum with inflow").section(5)).rows
    assert 8 <= len(rows) <= 14
    assert rows[0][0] == "1.800" and rows[0][-3] == "0"
    assert rows[-1][0] == "0.100" and spoken(rows[-1][-2]) == "36 min 53 s"
    assert rows[-1][-1] == f"{answers.draw_down.time.low:.0f} to {answers.draw_down.time.high:.0f}"


def test_us_units_show_in_the_results_and_si_in_the_method() -> None:
    sheet = sheet_of("US units")
    titles = [column.title for column in table(sheet.section(5)).columns]
    assert titles[:3] == ["Level, ft", "Volume, US gal", "Surface, ft²"]
    method = " ".join(part.text for part in sheet.section(4).parts if isinstance(part, Paragraph))
    assert "2.7972\u00a0m" in method


def test_display_units_may_be_chosen_against_the_case() -> None:
    metric = build_sheet(answers_to("US units"), version="1", fingerprint="x", display=display_units("metric"))
    assert table(metric.section(5)).columns[0].title == "Level, m"


def test_listed_sizes_say_what_each_achieves() -> None:
    rows = table(sheet_of("drum with inflow").section(8)).rows
    assert [row[-1] for row in rows] == ["no", "yes, over the whole range"]
    assert [spoken(row[2]) for row in rows] == ["26 min 19 s", "20 min 02 s"]
    words = sheet_of("sphere").section(8).parts[0]
    assert isinstance(words, Paragraph) and "No drain time was asked for" in words.text


def test_a_long_title_and_remarks_are_kept_whole() -> None:
    sheet = sheet_of("six outlets")
    assert sheet.heading.title == LONG_TITLE
    texts = [part.text for part in sheet.section(1).parts if isinstance(part, Paragraph)]
    assert len(texts[1].split()) > 300


def test_nothing_printed_calls_anything_safe() -> None:
    for name in CASES:
        for section in sheet_of(name).sections:
            for part in section.parts:
                words = part.text if isinstance(part, Paragraph) else str(part)
                assert "safe " not in words and "safe." not in words


def test_marks_come_apart_into_runs() -> None:
    text = f"C{lowered('d')} = {heavy(f'10{raised(chr(0x2212) + str(3))} m')}"
    found = [(run.text, run.shift, run.heavy) for run in runs(text)]
    assert found == [
        ("C", 0, False), ("d", -1, False), (" = ", 0, False), ("10", 0, True), ("−3", 1, True), (" m", 0, True),
    ]  # fmt: skip
    assert unmarked(text) == "Cd = 10−3 m"


@pytest.mark.parametrize(
    ("value", "digits", "text"),
    [
        (0.00502654, 5, "0.0050265"),
        (-2.5, 3, "−2.50"),
        (0.0, 4, "0"),
        (111592.3, 4, "111592"),
        (3.1e-7, 3, "3.10·10−7"),
    ],
)
def test_figures_read_back_as_they_were_rounded(value: float, digits: int, text: str) -> None:
    assert unmarked(figures(value, digits)) == text
    assert read_figure(figures(value, digits)) == pytest.approx(rounded(value, digits), rel=1e-12)


def test_coefficients_keep_the_digits_they_have() -> None:
    assert [coefficient(value) for value in (0.6, 0.61, 0.6125)] == ["0.60", "0.61", "0.6125"]


def test_numbers_hold_to_their_units_and_sentences_are_whole() -> None:
    assert bound("a = 0.5 m² and 3 m/s or 5 men") == "a = 0.5\u00a0m² and 3\u00a0m/s or 5 men"
    assert sentence("never reaches 0.1 m") == "Never reaches 0.1 m."
    assert sentence("") == ""
