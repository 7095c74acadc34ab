"""Moves a beam's path back by half the beam's width and compares it with the part.

Both DXF files are read with ezdxf and taken apart finely; the offset is made by
shapely (GEOS), which knows nothing of this project. Prints as JSON the largest
distance of the part's edge from the path moved back, and the other way round, over
all loops, in the order of the files. Usage: offset_back.py PART PATH WIDTH
"""
import json
import sys

import ezdxf
from ezdxf import path as ezpath
from shapely.geometry import Polygon

FLAT = 5e-5  # drawing units, distance of chords from arcs
CLOSED = 1e-8  # drawing units, ten steps of the files' last decimal


def loops(name):
    found = []
    for e in ezdxf.readfile(name).modelspace():
        if e.dxf.layer in ("OUTLINE", "BORE", "HOLES"):
            points = [(v.x, v.y) for v in flat(e)]
            found.append(Polygon(points))
    return found


def flat(e):
    if e.dxftype() == "CIRCLE":
        return list(e.flattening(FLAT))
    points = []
    for part in e.virtual_entities():
        if part.dxftype() == "ARC":
            v = list(part.flattening(FLAT))
            if points and v[0].distance(points[-1]) > v[-1].distance(points[-1]):
                v.reverse()
            elif not points:
                v = orient_first(e, v)
        else:
            v = [part.dxf.start, part.dxf.end]
        points.extend(v[1:] if points else v)
    if points[-1].distance(points[0]) < CLOSED:
        points.pop()  # the first again, but for rounding
    return points


def orient_first(e, v):
    x, y = e.get_points("xy")[0]
    first = ezdxf.math.Vec3(x, y)
    return v if v[0].distance(first) <= v[-1].distance(first) else v[::-1]


part, path, width = loops(sys.argv[1]), loops(sys.argv[2]), float(sys.argv[3])
if len(part) != len(path):
    sys.exit(f"{len(part)} loops in the part, {len(path)} in the path")
worst = []
for i, (p, q) in enumerate(zip(part, path)):
    # The outer loop comes last; its path lies outside, those of holes inside.
    back = q.buffer(-width / 2 if i == len(part) - 1 else width / 2, 64)
    worst.append(back.boundary.hausdorff_distance(p.boundary))
json.dump({"worst": worst, "valid": [p.is_valid for p in part + path]}, sys.stdout)
