"""DEVELOPERS.md opens with the 'where is …?' table, and every path that it names exists."""

import re

import structure

DOCUMENT = "DEVELOPERS.md"
ROW = re.compile(r"^\|(.+)\|(.+)\|\s*$")


def first_table(lines):
    """Line numbers (from 1) and cells of the first table, without its two head rows; and whether its head asks where."""
    rows, head = [], ""
    for number, line in enumerate(lines, 1):
        found = ROW.match(line)
        if found:
            rows.append((number, found.group(1).strip(), found.group(2).strip()))
        elif rows:
            break
    if rows:
        head = rows[0][1].lower()
    return rows[2:], head.startswith("where is")


def check(root):
    if not (root / DOCUMENT).exists():
        return [f"{DOCUMENT} is missing"]
    lines = (root / DOCUMENT).read_text().splitlines()
    rows, asks_where = first_table(lines)
    if not asks_where:
        return [f"{DOCUMENT}: the first table's head must begin with 'Where is'"]
    said = []
    if not rows:
        said.append(f"{DOCUMENT}: the 'where is …?' table has no rows")
    else:
        sections = [number for number, line in enumerate(lines, 1) if line.startswith("## ")]
        if sum(number < rows[0][0] for number in sections) > 1:
            said.append(f"{DOCUMENT}: the 'where is …?' table must stand in the first section")
    for number, question, answer in rows:
        paths = re.findall(r"`([^`]+)`", answer)
        if not paths:
            said.append(f"{DOCUMENT}:{number}: '{question}' names no path")
        said += [f"{DOCUMENT}:{number}: '{question}': {path} does not exist" for path in paths if not (root / path).exists()]
    return said


HEAD = "# Developing\n\n## Where is …?\n\n| Where is … | It is in |\n|---|---|\n"
GOOD = {DOCUMENT: HEAD + "| the rule | `src/rule.h` |\n\n| other | table |\n|---|---|\n| x | `none` |\n", "src/rule.h": ""}
BAD = [
    ({DOCUMENT: HEAD + "| the rule | `src/rules.h` |\n"}, "src/rules.h does not exist"),
    ({DOCUMENT: HEAD + "| the rule | `src/rule.h`, `src/rule.cc` |\n"}, "src/rule.cc does not exist"),
    ({DOCUMENT: HEAD + "| the rule | somewhere |\n"}, "names no path"),
    ({DOCUMENT: HEAD}, "has no rows"),
    ({DOCUMENT: "| Layer | Folder |\n|---|---|\n| a | `src` |\n\n" + HEAD + "| r | `src/rule.h` |\n"}, "must begin with"),
    ({DOCUMENT: "## Commands\n\n" + HEAD + "| r | `src/rule.h` |\n"}, "in the first section"),
]

if __name__ == "__main__":
    structure.run(check, GOOD, BAD)
