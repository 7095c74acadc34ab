"""Moves a beam's path back by half the beam's width and compares it with the part.

Both DXF files are read with ezdxf and taken apart finely; the offset is made by
shapely (GEOS), which knows nothing of this project. Prints as JSON the largest
distance of the part's edge from the path moved back, and the other way round, over
all loops, in the order of the files. Usage: offset_back.py PART PATH WIDTH
"""
import json
import sys

import ezdxf
from shapely.geometry import Polygon

from polyline import flat

FLAT = 5e-5  # drawing units, distance of chords from arcs


def loops(name):
    found = []
    for e in ezdxf.readfile(name).modelspace():
        if e.dxf.layer in ("OUTLINE", "BORE", "HOLES"):
            points = [(v.x, v.y) for v in flat(e, FLAT)]
            found.append(Polygon(points))
    return found


part, path, width = loops(sys.argv[1]), loops(sys.argv[2]), float(sys.argv[3])
if len(part) != len(path):
    sys.exit(f"{len(part)} loops in the part, {len(path)} in the path")
worst = []
for i, (p, q) in enumerate(zip(part, path)):
    # The outer loop comes last; its path lies outside, those of holes inside.
    back = q.buffer(-width / 2 if i == len(part) - 1 else width / 2, 64)
    worst.append(back.boundary.hausdorff_distance(p.boundary))
json.dump({"worst": worst, "valid": [p.is_valid for p in part + path]}, sys.stdout)
