"""No file speaks of a machine's folders or of work left undone."""

import re

import structure

# Spelt in pieces, so that this file does not find itself.
FORBIDDEN = [re.compile(pattern) for pattern in (
    r"(?<![\w.])/wo" r"rk/", r"(?<![\w.])/ro" r"ot/", r"(?<![\w.])/ho" r"me/", r"/tmp/n" r"p\b",
    r"\bTO" r"DO\b", r"\bFIX" r"ME\b", r"\bX" r"XX\b", r"\bHA" r"CK\b")]


def check(root):
    said = []
    for path in structure.project_files(root):
        text = structure.read_text(root / path)
        if text is None:
            continue
        for number, line in enumerate(text.splitlines(), 1):
            said += [f"{path}:{number}: '{found.group()}' has no place here" for found in
                     (pattern.search(line) for pattern in FORBIDDEN) if found]
    return said


GOOD = {"a.cc": 'mkdtemp("/tmp/nearpit-XXXXXX"); // framework/root/part\n', "b.bin": b"\0/wo" b"rk/"}
BAD = [({"x.cc": f"// see {word} here\n"}, "has no place here") for word in (
    "/wo" "rk/main", "/ro" "ot/x", "/ho" "me/x", "/tmp/n" "p/x", "TO" "DO", "FIX" "ME:", "X" "XX", "HA" "CK")]

if __name__ == "__main__":
    structure.run(check, GOOD, BAD)
