"""Drives the window as a hand does: a screen of its own (Xvfb), pointer and key events from xdotool, and nothing that reaches into the program. What it
shows is read from the file that NEARPIT_WIDGETS names: the program replaces it after every frame that has settled.

    with Screen(1280, 800) as screen:
        window = Window(screen, bench)      # bench: tests/cli/survey_runner.Bench, its folder is the home folder
        window.start("survey.gpkg")
        window.click("dig-list/record")

Every event waits for the frame that answers it, so that no test sleeps. What never comes raises Stuck, with what was on the screen."""

import json
import os
import select
import signal
import subprocess
import sys
import time
import unittest
from collections import namedtuple
from pathlib import Path

sys.path.insert(0, str(Path(__file__).resolve().parents[1] / "cli"))
from survey_runner import NEARPIT, Bench  # noqa: E402

PATIENCE_S = 30  # only a failing test waits so long
POLL_S = 0.002
QUIET_S = 0.15  # a screen that changes no more has settled
SCALE_1 = 96 / 25.4  # pixels a millimetre

Box = namedtuple("Box", "left top right bottom")
Control = namedtuple("Control", "kind path box visible least_mm flag label")
Text = namedtuple("Text", "path box visible size_px flag text")


class Stuck(AssertionError):
    """What was waited for never came."""


def middle(box):
    return (box.left + box.right) / 2, (box.top + box.bottom) / 2


class Screen:
    """A screen in memory, gone when the test is over."""

    def __init__(self, width=1280, height=800):
        self.width, self.height = width, height

    def __enter__(self):
        told, tells = os.pipe()
        command = ["Xvfb", "-displayfd", str(tells), "-screen", "0", f"{self.width}x{self.height}x24", "-nolisten", "tcp",
                   "-noreset"]
        self.server = subprocess.Popen(command, stdin=subprocess.DEVNULL, stdout=subprocess.DEVNULL,
                                       stderr=subprocess.DEVNULL, pass_fds=[tells])
        os.close(tells)
        try:
            number = b""
            while not number.endswith(b"\n"):
                ready, _, _ = select.select([told], [], [], PATIENCE_S)
                piece = os.read(told, 16) if ready else b""
                if not piece:
                    raise Stuck("Xvfb did not start")
                number += piece
        except BaseException:
            self.server.kill()
            raise
        finally:
            os.close(told)
        self.display = ":" + number.decode().strip()
        return self

    def __exit__(self, *_):
        self.server.terminate()
        self.server.wait(timeout=PATIENCE_S)

    def environment(self):
        return {"DISPLAY": self.display}

    def do(self, *words):
        """One call of xdotool."""
        subprocess.run(["xdotool", *map(str, words)], check=True, timeout=PATIENCE_S,
                       env={**os.environ, "DISPLAY": self.display})

    def begin(self, *words):
        """The same, not waited for."""
        return subprocess.Popen(["xdotool", *map(str, words)], env={**os.environ, "DISPLAY": self.display})

    def picture(self, path, colours=None):
        """All that the screen shows, as PNG."""
        picture = subprocess.run(["import", "-silent", "-window", "root", "png:-"], check=True, stdout=subprocess.PIPE,
                                 timeout=PATIENCE_S, env={**os.environ, "DISPLAY": self.display}).stdout
        reduced = ["-colors", str(colours)] if colours else []
        command = ["convert", "png:-", "-strip", *reduced, "-define", "png:exclude-chunks=date,time", f"png:{path}"]
        subprocess.run(command, input=picture, check=True, timeout=PATIENCE_S)


NEAR_PX = 130  # more than 12 mm on every glass here
SECOND_TOUCH_S = 0.9  # the window's 0.4 s begin when the new card is drawn


class Window:
    """The program on a screen; it may be started again and again."""

    def __init__(self, screen, bench, clock=None):
        self.last_press = (-1000, -1000, 0)
        self.screen, self.bench, self.clock = screen, bench, clock
        self.told = bench.path("widgets.txt")
        self.process = None
        self.read_from = None  # kept open, so that its inode number is not given to the next one
        self.controls, self.texts = {}, []

    # ---- the process ----

    def start(self, *arguments, **environment):
        """Starts the program and waits for its first settled frame; how many seconds that took."""
        if self.told.exists():
            self.told.unlink()
        self.close_told()
        begun = time.monotonic()
        self.process = self.bench.start(*arguments, clock=self.clock, environment={
            **self.screen.environment(), "NEARPIT_WIDGETS": str(self.told),
            "NEARPIT_WINDOW": f"{self.screen.width}x{self.screen.height}", **environment})
        self.until(self.told.exists, "no frame was drawn")
        took = time.monotonic() - begun
        self.settle()
        return took

    def kill(self):
        """SIGKILL: the program can do nothing about it."""
        self.process.kill()
        self.ended()

    def terminate(self):
        """Asks the program to end; its exit code."""
        self.process.send_signal(signal.SIGTERM)
        return self.ended()

    def ended(self):
        out, err = self.process.communicate(timeout=PATIENCE_S)
        self.said = (out + err).decode("utf-8", "replace")
        self.close_told()
        return self.process.returncode

    def close(self):
        if self.process and self.process.poll() is None:
            self.kill()
        self.close_told()

    def remember(self, **preferences):
        """What the window would remember of an earlier start: px_per_mm as calibrated, dusk, recent."""
        folder = self.bench.config / "nearpit"
        folder.mkdir(parents=True, exist_ok=True)
        (folder / "window.json").write_text(json.dumps({"px_per_mm": SCALE_1, **preferences}))

    # ---- what it shows ----

    def close_told(self):
        if self.read_from:
            self.read_from.close()
        self.read_from = None

    def changed(self):
        """Whether a frame settled since the screen was last read."""
        try:
            there = os.stat(self.told)
        except FileNotFoundError:
            return False
        return self.read_from is None or there.st_ino != os.fstat(self.read_from.fileno()).st_ino

    def read(self):
        """Reads what the last settled frame showed."""
        fresh = open(self.told, encoding="utf-8", newline="\n")
        self.close_told()
        self.read_from = fresh
        self.controls, self.texts = {}, []
        for line in fresh.read().splitlines():
            kind, path, box, visible, size, flag, said = line.split("\t")
            box, visible = (Box(*map(float, numbers.split(","))) for numbers in (box, visible))
            if kind == "text":
                self.texts.append(Text(path, box, visible, float(size), flag, said))
            else:
                self.controls[path] = Control(kind, path, box, visible, float(size), flag, said)

    def until(self, came, missed):
        end = time.monotonic() + PATIENCE_S
        while not came():
            if self.process.poll() is not None:
                self.ended()
                raise Stuck(f"{missed}: the program ended with {self.process.returncode}: {self.said}")
            if time.monotonic() > end:
                raise Stuck(f"{missed}; on the screen: {self.shown()}")
            time.sleep(POLL_S)

    def settle(self):
        """Waits until the screen changes no more."""
        quiet_since = time.monotonic()
        while time.monotonic() - quiet_since < QUIET_S:
            if self.changed():
                self.read()
                quiet_since = time.monotonic()
            time.sleep(POLL_S)

    def event(self, *words):
        """One event, and the settled frame after it."""
        if self.changed():
            self.read()
        self.screen.do(*words)
        self.until(self.changed, f"nothing followed '{' '.join(map(str, words))}'")
        self.read()

    def wait_for(self, told, what):
        """Waits until what is shown fulfils told()."""
        def came():
            if self.changed():
                self.read()
            return told()
        self.until(came, f"waited in vain for {what}")

    def shown(self):
        return " | ".join(f"{text.path} {text.text}" for text in self.texts) or "nothing"

    def has(self, path):
        return path in self.controls

    def says(self, part, under=""):
        """Whether a text under that path holds the words."""
        return any(part in text.text and text.path.startswith(under) for text in self.texts)

    def texts_of(self, path):
        return [text.text for text in self.texts if text.path == path]

    def control(self, path):
        if path not in self.controls:
            raise Stuck(f"no control {path}; there are: {', '.join(self.controls)}; on the screen: {self.shown()}")
        return self.controls[path]

    # ---- hands ----

    def press(self, x, y):
        # A second touch on the same place just after a card changed is dropped by the window: a hand is slower than that.
        last_x, last_y, last_time = self.last_press
        if abs(x - last_x) < NEAR_PX and abs(y - last_y) < NEAR_PX:
            time.sleep(max(0, last_time + SECOND_TOUCH_S - time.monotonic()))
        self.last_press = (x, y, time.monotonic())
        self.event("mousemove", round(x), round(y), "mousedown", 1)

    def let_go(self):
        self.event("mouseup", 1)

    def tap(self, x, y):
        self.press(x, y)
        self.let_go()

    def click(self, *paths):
        """Touches controls, one after another, in their middles."""
        for path in paths:
            self.tap(*self.where(path))

    def where(self, path):
        control = self.control(path)
        box, visible = control.box, control.visible
        if visible.bottom - visible.top < (box.bottom - box.top) / 2 or visible.right <= visible.left:
            raise Stuck(f"{path} is scrolled out of sight")
        return middle(visible)

    def click_in_list(self, path, down):
        """Touches a row of a list that may have to be paged down to; `down` is the button that does."""
        for _ in range(100):
            control = self.controls.get(path)
            if control and control.visible.bottom - control.visible.top > (control.box.bottom - control.box.top) / 2:
                self.click(path)
                return
            self.click(down)
        raise Stuck(f"no row {path} in that list")

    def drag(self, from_x, from_y, to_x, to_y, steps=4):
        self.press(from_x, from_y)
        for step in range(1, steps + 1):
            self.event("mousemove", round(from_x + (to_x - from_x) * step / steps),
                       round(from_y + (to_y - from_y) * step / steps))
        self.let_go()

    def wheel(self, x, y, steps):
        """Turned up (steps > 0: nearer) or down."""
        for _ in range(abs(steps)):
            self.event("mousemove", round(x), round(y), "click", 4 if steps > 0 else 5)

    def key(self, *names):
        """Keys by their X names: Return, Down, n, plus."""
        for name in names:
            self.event("key", name)

    def typed(self):
        """The line of the typing card."""
        return (self.texts_of("typing/") + ["", ""])[1]

    def write(self, text):
        """Types into the typing card by the keyboard, behind what stands there."""
        wanted = self.typed() + text
        self.screen.do("type", "--delay", 8, text)
        self.wait_for(lambda: self.typed() == wanted, f"{wanted!r} on the typing card")
        self.settle()

    def touch_letters(self, text):
        """The same by the typing card's own keys."""
        for letter in text:
            self.click("typing/letters/" + {" ": "space"}.get(letter, letter))


class OnSmallGlass(unittest.TestCase):
    """A bench, and a window on a screen of 1024 x 600 whose millimetre is known."""

    def setUp(self):
        self.bench = Bench()
        self.addCleanup(self.bench.close)
        self.screen = Screen(1024, 600)
        self.screen.__enter__()
        self.addCleanup(self.screen.__exit__)
        self.window = Window(self.screen, self.bench)
        self.addCleanup(self.window.close)
        self.window.remember(px_per_mm=4.7)
