"""What the structure tests share: the project's files, and a runner that proves a check can fail before it trusts it."""

import os
import subprocess
import sys
import tempfile
from pathlib import Path


def project_files(root):
    """The project's files, relative to root: those git tracks or would track; without git, all but build trees."""
    root = Path(root)
    if (root / ".git").exists():
        listed = subprocess.run(
            ["git", "-C", str(root), "ls-files", "-z", "--cached", "--others", "--exclude-standard"],
            check=True, capture_output=True).stdout.decode()
        return sorted(name for name in set(listed.split("\0")) if name and (root / name).is_file())
    found = []
    for folder, subfolders, names in os.walk(root):
        subfolders[:] = [name for name in subfolders if name not in ("build", "__pycache__", ".git")]
        found += [str((Path(folder) / name).relative_to(root)) for name in names]
    return sorted(found)


def read_text(path):
    """The file as text, or None when it is binary."""
    data = Path(path).read_bytes()
    if b"\0" in data:
        return None
    return data.decode("utf-8", errors="replace")


def complaints_about(check, files):
    """What check says of a small tree made of files (name: text)."""
    with tempfile.TemporaryDirectory() as folder:
        for name, text in files.items():
            path = Path(folder) / name
            path.parent.mkdir(parents=True, exist_ok=True)
            path.write_bytes(text if isinstance(text, bytes) else text.encode())
        return check(Path(folder))


def run(check, good, bad):
    """Runs check on `good`, which must pass, on good plus each of `bad` (files, words expected in the complaint), which
    must fail, then on the project. Ends the program."""
    said = complaints_about(check, good)
    if said:
        sys.exit("self-test: a good tree is refused: " + "; ".join(said))
    for files, expected in bad:
        said = complaints_about(check, {**good, **files})
        if not any(expected in line for line in said):
            sys.exit(f"self-test: {sorted(files)} should be refused with '{expected}', but the test said {said}")
    root = Path(os.environ.get("NEARPIT_SOURCE") or Path(__file__).resolve().parents[2])
    said = check(root)
    for line in said:
        print(line, file=sys.stderr)
    print(f"{len(bad)} bad examples refused, {len(said)} complaints about {root.name}")
    sys.exit(1 if said else 0)
