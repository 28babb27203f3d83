"""Makes the README's pictures: plays an invented demo survey by command, opens it in the real window on a screen in memory, and takes PNGs of what is shown.

    python3 tests/window/pictures.py [FOLDER]      (default: demo_projects/pictures)

Each picture is of a state that pointer and keys reach. The clock stands still, so that the same program makes the same pictures."""

import re
import subprocess
import sys
from pathlib import Path

sys.path.insert(0, str(Path(__file__).resolve().parent))
from window_runner import SCALE_1, Screen, Window
from survey_runner import NEARPIT, SOURCE, Bench

DEMO = SOURCE / "demo_projects" / "cinder_brook"
COLOURS = 64
LARGEST = 150_000
TABLET = (1280, 800, 1.5)  # pixels and scale: ten inches
SMALL = (1024, 600, 1.25)


class Pictures:
    def __init__(self, folder, bench):
        self.folder, self.bench = folder, bench
        self.file = bench.path("surveys/cinder_brook.gpkg")
        self.clock = (DEMO / "clock.txt").read_text().split()[-1]
        play = f'. "{SOURCE}/demo_projects/play.sh" && play_demo "$0" "$1" "$2"'
        subprocess.run(["bash", "-c", play, NEARPIT, str(DEMO), str(self.file.parent)], check=True,
                       stdout=subprocess.DEVNULL)

    def take(self, name, glass, way, dusk=False):
        """Opens the survey on such a glass, goes the way, takes the picture; nothing that it typed stays."""
        width, height, scale = glass
        with Screen(width, height) as screen:
            window = Window(screen, self.bench, clock=self.clock)
            window.remember(px_per_mm=scale * SCALE_1, dusk=dusk)
            window.start(self.file)
            try:
                window.click("strip/crew", "office/crew-0", "strip/dig-list")
                way(window)
                window.screen.do("mousemove", width, height)
                path = self.folder / f"{name}.png"
                screen.picture(path, COLOURS)
                for text in window.texts:
                    if text.flag == "cut":
                        print(f"{name}: cut: {text.path} '{text.text}'")
            finally:
                window.close()
                for draft in (self.bench.config / "nearpit").glob("drafts-*"):
                    draft.unlink()
        size = path.stat().st_size
        print(f"{path.name}: {size // 1000} kB" + (" is too large" if size > LARGEST else ""))
        return size <= LARGEST


def dig_list(window):
    """Another pit than the one proposed."""
    rows = [path for path in window.controls if re.fullmatch(r"dig-list/T\d+-\d+", path)]
    window.click(rows[2])


def record(window):
    dig_list(window)
    window.click("dig-list/record", "record/find-0/more", "record/find-0/more", "record/find-1/more", "record/depth", "record/digits/4",
                 "record/digits/2")


def day(window):
    window.click("strip/day")


def clusters(window):
    window.click("strip/clusters")
    window.click(next(path for path, control in window.controls.items()
                      if path.startswith("clusters/T") and control.kind == "button"))


def near(window):
    """The map nearer, the next pit in its middle."""
    dig_list(window)
    window.key("m", "plus", "plus", "plus", "plus", "m")


def typing(window):
    dig_list(window)
    window.click("dig-list/record", "record/find-0/more", "record/note")
    window.write("flakes at the foot of the plough soil, charcoal below")


def main():
    folder = Path(sys.argv[1] if len(sys.argv) > 1 else SOURCE / "demo_projects" / "pictures")
    folder.mkdir(parents=True, exist_ok=True)
    bench = Bench()
    try:
        pictures = Pictures(folder, bench)
        fits = [pictures.take("dig-list", TABLET, dig_list), pictures.take("record", TABLET, record),
                pictures.take("day", TABLET, day), pictures.take("clusters", TABLET, clusters),
                pictures.take("dusk-map", TABLET, near, dusk=True), pictures.take("typing", TABLET, typing),
                pictures.take("small-glass", SMALL, dig_list)]
    finally:
        bench.close()
    return 0 if all(fits) else 1


if __name__ == "__main__":
    sys.exit(main())
