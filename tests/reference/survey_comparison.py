"""What differs between the program's answers and the oracle's, as lines of text; no line means that they agree.

Counts, labels, nulls and statuses must be equal, positions agree to 1e-6 m, figures to 1e-9 of their size. A variance may also
differ by 1e-15 of the square of the mean, because it is a difference of nearly equal sums.
"""

import math

RELATIVE = 1e-9
PLACE_M = 1e-6


def close(got, want, floor=0.0):
    if got is None or want is None:
        return got is None and want is None
    return abs(float(got) - float(want)) <= max(RELATIVE * abs(float(want)), floor)


def differences(survey, next_answer, tally_answer):
    return dig_list(survey.next(), next_answer) + tally(survey, survey.tally(), tally_answer)


def differ(where, got, want):
    return [] if got == want else [f"{where}: program {got!r}, oracle {want!r}"]


def dig_list(want, got):
    due = {row["pit"]: row for row in got["due"]}
    lines = [] if len(due) == len(got["due"]) else ["next: a pit stands twice in due"]
    missing, extra = sorted(want["due"].keys() - due.keys()), sorted(due.keys() - want["due"].keys())
    if missing or extra:
        lines.append(f"next: due lacks {missing}, has {extra} too many")
    for pit in want["due"].keys() & due.keys():
        mine, theirs = want["due"][pit], due[pit]
        lines += differ(f"next {pit} because", theirs["because"], mine["because"])
        lines += differ(f"next {pit} of", sorted(theirs["of"]), mine["of"])
        lines += differ(f"next {pit} ring", theirs["ring"], mine["ring"])
        if math.dist((theirs["x"], theirs["y"]), (mine["x"], mine["y"])) > PLACE_M:
            lines.append(f"next {pit}: program at {theirs['x']}, {theirs['y']}, oracle at {mine['x']}, {mine['y']}")
    for key in ("first_sample_left", "neighbours_left", "open_clusters"):
        lines += differ("next " + key, got[key], want[key])
    return lines


def tally(survey, want, got):
    lines = frame(want["frame"], got["frame"])
    for key, value in want["progress"].items():
        lines += differ("progress " + key, got["progress"].get(key), value)
    lines += differ("missed_cluster_pits", got["missed_cluster_pits"], want["missed_cluster_pits"])
    lines += clusters(want["clusters"], got["clusters"])
    rows = [(row["of"], row["estimator"]) for row in got["estimates"]]
    lines += differ("estimates", rows, [(row["of"], row["estimator"]) for row in want["estimates"]])
    if not lines:
        for mine, theirs in zip(want["estimates"], got["estimates"]):
            lines += estimate(survey, mine, theirs)
    return lines


def frame(want, got):
    lines = differ("frame strata", [{k: s[k] for k in ("name", "primary_units", "drawn")} for s in got["strata"]], want["strata"])
    lines += differ("frame pits", got["pits"], want["pits"])
    for key in ("area_m2", "boundary_m2", "pit_area_m2"):
        if not close(got[key], want[key], floor=1e-6 if key == "boundary_m2" else 0):
            lines.append(f"frame {key}: program {got[key]}, oracle {want[key]}")
    return lines


def clusters(want, got):
    lines = differ("clusters", [c["pits"] for c in got], [c["pits"] for c in want])
    if lines:
        return lines
    for mine, theirs in zip(want, got):
        for key in ("label", "finds", "in_first_sample", "closed"):
            lines += differ(f"cluster {mine['label']} {key}", theirs[key], mine[key])
        lines += differ(f"cluster {mine['label']} open_because", sorted(theirs["open_because"]), sorted(mine["open_because"]))
        if not close(theirs["area_m2"], mine["area_m2"]):
            lines.append(f"cluster {mine['label']} area_m2: program {theirs['area_m2']}, oracle {mine['area_m2']}")
    return lines


def estimate(survey, want, got):
    where = f"{want['of']}, {want['estimator']}"
    lines = differ(where + " status", got["status"], want["status"])
    mean = float(want["mean_per_pit"])
    for key in ("mean_per_pit", "per_m2", "total"):
        if not close(got[key], want[key]):
            lines.append(f"{where} {key}: program {got[key]}, oracle {want[key] if want[key] is None else float(want[key])}")
    variance, floor = want["variance_of_mean"], 1e-15 * mean ** 2
    if not close(got["variance_of_mean"], variance, floor):
        lines.append(f"{where} variance_of_mean: program {got['variance_of_mean']}, "
                     f"oracle {variance if variance is None else float(variance)}")
    elif variance is None or abs(variance) > floor:  # the sign of a variance of 0 is the last digit's
        if not close(got["standard_error"], want["standard_error"]):
            lines.append(f"{where} standard_error: program {got['standard_error']}, oracle {want['standard_error']}")
        lines += interval(survey, where, want["plain_t"], got["interval"])
        lines += ground(where, want["ground_standard_error"], got["ground"])
    if (got["variance_of_mean"] is None or got["status"] != "final") and not got["why"]:
        lines.append(f"{where}: nothing in why")
    return lines


def interval(survey, where, plain_t, got):
    """The ends are compared for the plain t and for a sample of everything; any method must keep the level and the order of its ends."""
    if got is None or plain_t is None:
        return differ(where + " interval", got, plain_t)
    lines = differ(where + " interval level", got["level"], survey.plan.get("confidence", 0.95))
    if got["method"] in ("plain t", "every unit drawn") and not all(map(close, (got["lower"], got["upper"]), plain_t)):
        lines.append(f"{where} interval: program {got['lower']} to {got['upper']}, oracle {plain_t[0]} to {plain_t[1]}")
    if not got["lower"] <= got["upper"]:
        lines.append(f"{where} interval: lower {got['lower']} above upper {got['upper']}")
    return lines


def ground(where, want, got):
    """The ground's standard error is a difference of nearly equal sums too, so that a 0 may come out as a last digit."""
    got = got and got["standard_error"]
    if close(got, want, floor=1e-6 if want == 0 else 0):
        return []
    return [f"{where} ground standard_error: program {got}, oracle {want}"]
