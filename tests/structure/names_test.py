"""Files are named so that they are found: unique base names, header and source together, tests named after what they
test, nothing unexpected at the top, no large binaries."""

import structure

TOP = {"CMakeLists.txt", "CMakePresets.json", "README.md", "DEVELOPERS.md", "CHANGELOG.md", "LICENSE",
       "src", "ui", "schema", "tests", "demo_projects"}
PICTURES = (".png", ".jpg", ".jpeg", ".svg")
LARGEST_BINARY = 200_000


def stem(path):
    return path.rsplit("/", 1)[-1].rsplit(".", 1)[0]


def header_complaints(files):
    said, first = [], {}
    for path in files:
        if path.startswith(("src/", "ui/")) and path.endswith(".h"):
            if stem(path) in first:
                said.append(f"{path}: the base name is taken by {first[stem(path)]}")
            first.setdefault(stem(path), path)
    return said


def source_complaints(files):
    said = []
    for path in files:
        if path.startswith(("src/", "ui/")) and path.endswith(".cc"):
            if stem(path) != "main" and path[:-3] + ".h" not in files:
                said.append(f"{path}: has no header {stem(path)}.h beside it")
        elif path.startswith(("src/", "ui/")) and not path.endswith(".h"):
            said.append(f"{path}: src and ui hold .h and .cc files only")
    return said


def test_complaints(files):
    """A C++ test of a folder of src begins with the name of one of that folder's headers."""
    said = []
    for path in files:
        parts = path.split("/")
        if parts[0] != "tests" or not path.endswith(".cc") or len(parts) < 3:
            continue
        ending = "_bench" if parts[1] == "bench" else "_test"
        if parts[1] != "support" and not stem(path).endswith(ending) and path[:-3] + ".h" not in files:
            said.append(f"{path}: is named neither *{ending}.cc nor after a header beside it")
        headers = {stem(name) for name in files if name.startswith(f"src/{parts[1]}/") and name.endswith(".h")}
        if stem(path).endswith("_test") and headers and not any(stem(path).startswith(name + "_") for name in headers):
            said.append(f"{path}: begins with the name of no header of src/{parts[1]}")
    return said


def check(root):
    files = structure.project_files(root)
    known = set(files)
    said = header_complaints(files) + source_complaints(known) + test_complaints(known)
    for path in files:
        top = path.split("/")[0]
        if top not in TOP and not top.startswith("."):
            said.append(f"{path}: {top} has no place at the top of the tree")
        if (root / path).stat().st_size > LARGEST_BINARY and not path.endswith(PICTURES):
            if structure.read_text(root / path) is None:
                said.append(f"{path}: a binary of more than {LARGEST_BINARY // 1000} kB")
    return said


GOOD = {"README.md": "", ".gitignore": "", "src/lattice/node.h": "", "src/lattice/node.cc": "", "src/cli/main.cc": "",
        "tests/lattice/node_test.cc": "", "tests/lattice/node_laws_test.cc": "", "tests/fault/power_cut_test.cc": "",
        "tests/bench/draw_bench.cc": "", "tests/support/plans.h": "", "tests/support/plans.cc": "",
        "tests/a.png": b"\0" * 300_000}
BAD = [
    ({"ui/node.h": ""}, "the base name is taken by src/lattice/node.h"),
    ({"src/lattice/edge.cc": ""}, "has no header edge.h"),
    ({"src/lattice/notes.txt": ""}, ".h and .cc files only"),
    ({"tests/lattice/node_tests.cc": ""}, "is named neither"),
    ({"tests/bench/draw_test.cc": ""}, "is named neither"),
    ({"tests/lattice/edge_test.cc": ""}, "begins with the name of no header"),
    ({"notes.txt": ""}, "has no place at the top"),
    ({"tests/a.gpkg": b"\0" * 200_001}, "a binary of more than 200 kB"),
]

if __name__ == "__main__":
    structure.run(check, GOOD, BAD)
