"""Stratigraphic thickness of a stretch of tape by plain vectors: python3 thickness_along_tape.py > thickness-along-tape.csv

The plane of bedding is spanned by its strike and its dip line; their cross product, turned upward, is its pole. The end of
the tape is walked to in two steps, along the map and up; its distance from the plane through the start is the thickness.
No closed formula is used.
"""
import csv
import random
import sys
from fractions import Fraction
from math import cos, radians, sin


def cross(a, b):
    return (a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0])


def thickness(tape, bearing, slope, dip, direction, overturned):
    """East, north, up; angles in degrees, bearings clockwise from north."""
    level, up = tape * cos(radians(slope)), tape * sin(radians(slope))
    end = (level * sin(radians(bearing)), level * cos(radians(bearing)), up)
    strike = (sin(radians(direction - 90)), cos(radians(direction - 90)), 0.0)
    down_dip = (
        cos(radians(dip)) * sin(radians(direction)),
        cos(radians(dip)) * cos(radians(direction)),
        -sin(radians(dip)),
    )
    pole = cross(down_dip, strike)
    if pole[2] < 0:
        pole = tuple(-part for part in pole)
    if dip == 90:  # the pole is level: younging is read as the limit of steep upright beds, towards the dip direction
        pole = (sin(radians(direction)), cos(radians(direction)), 0.0)
    away = sum(float(Fraction(a) * Fraction(b)) for a, b in zip(end, pole))
    return -away if overturned else away


textbook = [
    # tape, bearing, slope, dip, direction, overturned: what a text's own cases are
    ("level tape down the dip", 10, 90, 0, 30, 90, False),
    ("level tape up the dip", 10, 270, 0, 30, 90, False),
    ("level tape along the strike", 10, 0, 0, 30, 90, False),
    ("level tape oblique to the strike", 100, 120, 0, 40, 90, False),
    ("slope against the dip", 50, 270, 20, 35, 90, False),
    ("slope with the dip, gentler", 50, 90, -20, 35, 90, False),
    ("slope with the dip, steeper", 50, 90, -50, 35, 90, False),
    ("slope as the dip", 50, 90, -35, 35, 90, False),
    ("up a cliff of level beds", 12, 45, 90, 0, 0, False),
    ("over beds on end", 7, 215, 0, 90, 215, False),
    ("overturned beds", 10, 90, 0, 70, 90, True),
    ("down a borehole", 100, 0, -90, 15, 200, False),
]
generator = random.Random(20)
drawn = [
    (
        f"drawn {i}",
        round(generator.uniform(0.1, 300), 2),
        generator.randint(0, 360),
        generator.randint(-60, 60),
        generator.randint(0, 89),
        generator.randint(0, 360),
        generator.random() < 0.3,
    )
    for i in range(40)
]
out = csv.writer(sys.stdout, lineterminator="\n")
out.writerow(["case", "tape", "bearing", "slope", "dip", "direction", "overturned", "thickness"])
for name, *case in textbook + drawn:
    *angles, overturned = case
    out.writerow([name, *angles, "yes" if overturned else "no", repr(thickness(*case))])
