"""Every #include of src and ui obeys tests/structure/include_table.txt, and the tests' oracles include nothing that they check."""

import re

import structure

TABLE = "tests/structure/include_table.txt"
# What an oracle of tests/ may share with the program: where things are, not what follows from them.
ORACLE = re.compile(r"oracle|^naive_")
ORACLE_MAY = {"base", "lattice", "design"}
INCLUDE = re.compile(r'^\s*#\s*include\s*([<"])([^>"]+)[>"]', re.MULTILINE)


def read_table(root):
    """Folder to the folders it may include; header (or prefix ending in '/') to the folders that may include it."""
    folders, headers = {}, {}
    for line in (root / TABLE).read_text().splitlines():
        line = line.split("#")[0].strip()
        if not line:
            continue
        name, _, allowed = line.partition(":")
        if name.startswith("<"):
            headers[name.strip("<>")] = set(allowed.split())
        else:
            folders[name] = set(allowed.split())
    return folders, headers


def table_complaints(folders, headers):
    """The table itself points down only: a folder may include nothing but folders that stand above its own row."""
    said, seen = [], set()
    for folder, allowed in folders.items():
        said += [f"{TABLE}: {folder} may include {name}, which does not stand above it" for name in sorted(allowed - seen)]
        seen.add(folder)
    for header, allowed in headers.items():
        said += [f"{TABLE}: <{header}> names the unknown folder {name}" for name in sorted(allowed)
                 if name.split("/")[0] not in seen]
    return said


def own_include_complaint(where, folder, name, folders, files):
    target = name.split("/")[0] if "/" in name else ""
    if f"src/{name}" in files:
        if target not in folders[folder] | {folder, "base"}:
            allowed = ", ".join(sorted(folders[folder] | {"base"}))
            return f'{where}: #include "{name}": {folder} may not include {target} (it may: {allowed})'
        return None
    if f"ui/{name}" in files:
        return None if "ui" in folders[folder] | {folder} else (
            f'{where}: #include "{name}": nothing under src may include the window')
    return f'{where}: #include "{name}": no such header; write it as "folder/name.h" from src'


def third_party_complaint(where, path, folder, name, headers):
    """A header is for whole folders, or for parts of one ("ui/widgets", "ui/window/app_window.cc")."""
    for header, allowed in headers.items():
        in_part = any("/" in one and (path + "/").startswith(one + "/") for one in allowed)
        if (name == header or header.endswith("/") and name.startswith(header)) and folder not in allowed and not in_part:
            return f"{where}: #include <{name}>: only {', '.join(sorted(allowed))} may include it"
    return None


def includes_of(root, path):
    """(where, quote or bracket, name) of each include of a file."""
    text = (root / path).read_text()
    for found in INCLUDE.finditer(text):
        yield f"{path}:{text.count(chr(10), 0, found.start(2)) + 1}", found.group(1), found.group(2)


def source_complaints(root, path, folder, folders, headers, files):
    if folder not in folders:
        return [f"{path}: the folder {folder} does not stand in {TABLE}"]
    said = []
    for where, mark, name in includes_of(root, path):
        if mark == '"':
            said.append(own_include_complaint(where, folder, name, folders, files))
        else:
            said.append(third_party_complaint(where, path, folder, name, headers))
    return [complaint for complaint in said if complaint]


def oracle_complaints(root, path, folders):
    return [f'{where}: #include "{name}": an oracle includes nothing of what it checks'
            for where, _, name in includes_of(root, path) if name.split("/")[0] in set(folders) - ORACLE_MAY]


def check(root):
    folders, headers = read_table(root)
    said = table_complaints(folders, headers)
    files = set(structure.project_files(root))
    for path in sorted(files):
        parts = path.split("/")
        if not path.endswith((".h", ".cc")):
            continue
        if parts[0] in ("src", "ui"):
            # src/main.cc stands alone: it alone knows commands and window.
            folder = "ui" if parts[0] == "ui" else "main" if len(parts) == 2 else parts[1]
            said += source_complaints(root, path, folder, folders, headers, files)
        elif parts[0] == "tests" and ORACLE.search(parts[-1]) and not parts[-1].endswith("_test.cc"):
            said += oracle_complaints(root, path, folders)
    return said


GOOD_TABLE = ("base:\nlattice: # nothing\nstore: lattice\ncli: store\nui: store\nmain: cli ui\n<sqlite3.h>: store\n<CLI/>: cli\n"
              "<imgui.h>: ui/widgets ui/field_map\n<GLFW/>: ui/window/app_window.cc\n")
GOOD = {
    TABLE: GOOD_TABLE,
    "src/base/text.h": "#include <string>\n",
    "src/lattice/node.h": '#include "base/text.h"\n',
    "src/store/file.cc": '#include <sqlite3.h>\n#include "lattice/node.h"\n',
    "src/cli/line.cc": "#include <CLI/CLI.hpp>\n",
    "src/cli/line.h": "",
    "src/main.cc": '#include "card.h"\n#include "cli/line.h"\n',
    "ui/card.h": '#include "base/text.h"\n',
    "ui/widgets/button.cc": "#include <imgui.h>\n",
    "ui/window/app_window.cc": "#include <GLFW/glfw3.h>\n",
    "tests/support/naive_list.cc": '#include "lattice/node.h"\n#include "support/naive_list.h"\n',
}
BAD = [
    ({"src/lattice/a.h": '#include "store/b.h"\n', "src/store/b.h": ""}, "lattice may not include store"),
    ({"src/base/a.h": '\n#include "lattice/node.h"\n'}, "src/base/a.h:2:"),
    ({"src/cli/a.h": '#include "lattice/node.h"\n'}, "cli may not include lattice"),
    ({"src/lattice/a.h": "#  include <sqlite3.h>\n"}, "only store may include it"),
    ({"src/store/a.h": "#include <CLI/App.hpp>\n"}, "only cli may include it"),
    ({"src/cli/a.cc": '#include "card.h"\n'}, "nothing under src may include the window"),
    ({"src/cli/a.cc": '#include "missing.h"\n'}, "no such header"),
    ({"ui/cards/a.cc": "#include <imgui.h>\n"}, "only ui/field_map, ui/widgets may include it"),
    ({"ui/window/other.cc": "#include <GLFW/glfw3.h>\n"}, "only ui/window/app_window.cc may include it"),
    ({"src/main.cc": '#include "store/file.h"\n', "src/store/file.h": ""}, "main may not include store"),
    ({"src/attic/a.h": ""}, "does not stand in"),
    ({"tests/support/exact_oracle.cc": '#include "store/b.h"\n'}, "an oracle includes nothing"),
    ({"tests/support/naive_list.h": '#include "store/b.h"\n'}, "an oracle includes nothing"),
    ({TABLE: GOOD_TABLE.replace("lattice: ", "lattice: store ")}, "which does not stand above it"),
    ({TABLE: GOOD_TABLE.replace("<CLI/>: cli", "<CLI/>: cly")}, "unknown folder cly"),
]

if __name__ == "__main__":
    structure.run(check, GOOD, BAD)
