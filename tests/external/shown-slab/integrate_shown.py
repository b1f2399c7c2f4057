"""The slab a demonstration shows, integrated by a general-purpose ODE solver, as CSV on standard output.

One row a place of one pulse (tbw, flip_deg): mxy and mz there. `use` says what it is for:
`partition`, where tissue one acquired width W away from the centre of partition `index` lies, W = `acquired` partitions
of the 48 that the slab has; `centre`, the slab's middle; `crossing-low` and `crossing-high`, 0.005 of the slab inside and
outside the place where the published spoiled profile crosses `percent` of its middle.
"""

import csv
import pathlib
import sys

HERE = pathlib.Path(__file__).resolve().parent
sys.path.insert(0, str(HERE.parent / "bloch-ode"))
from integrate_bloch import respond  # noqa: E402

PARTITIONS = 48
SHOWN = [(6, 12, 48), (6, 12, 54), (14, 12, 48)]
STEP = 0.005


def write(use, tbw, flip, acquired, index, percent, z):
    mxy, mz = respond(tbw, flip, z)
    print(f"{use},{tbw},{flip},{acquired},{index},{percent},{z:.9f},{mxy:.9f},{mz:.9f}")


print("use,tbw,flip_deg,acquired,index,percent,z_over_slab,mxy,mz")
for tbw, flip in sorted({(tbw, flip) for tbw, flip, _ in SHOWN}):
    write("centre", tbw, flip, 0, 0, 0, 0.0)
for tbw, flip, acquired in SHOWN:
    for index in range(PARTITIONS // 2):
        # From beyond the high end onto the low half; the other end is its mirror image.
        centre = (index - (PARTITIONS - 1) / 2) / PARTITIONS
        write("partition", tbw, flip, acquired, index, 0, centre + acquired / PARTITIONS)
with open(HERE.parents[2] / "fixtures/published/slab-profile/values.csv") as file:
    for row in csv.DictReader(file):
        tbw, flip = int(row["tbw"]), int(row["flip_deg"])
        write("centre", tbw, flip, 0, 0, 0, 0.0)
        for percent in (1, 2, 5, 10):
            edge = 0.5 + float(row[f"spoiled_{percent}pct"])
            write("crossing-low", tbw, flip, 0, 0, percent, edge - STEP)
            write("crossing-high", tbw, flip, 0, 0, percent, edge + STEP)
