"""Judges an assembly drawing with polygons: members as placed do not overlap and touch,
and touch on the other flank when member 2 is turned (a rack moved) by the backlash.

The DXF file is read with ezdxf and taken apart finely; shapely (GEOS) knows nothing of
this project. A ring without a rim is a hole in the plane. Prints as JSON the gaps and
overlaps (areas) as placed, turned by half of the backlash, by all of it, and by twice as
much. Usage: assembly_check.py DXF CENTER_X CENTER_Y ANGLE_DEG MOVE_X MOVE_Y
"""
import json
import sys

import ezdxf
from shapely import affinity
from shapely.geometry import Polygon, box

from polyline import flat

FLAT = 2e-5  # drawing units, distance of chords from arcs


def member(doc, number):
    loops = []
    for e in doc.modelspace():
        if e.dxf.layer == f"OUTLINE-{number}":
            loops.append(Polygon([(v.x, v.y) for v in flat(e, FLAT)]))
    loops.sort(key=lambda p: p.area)
    return loops


doc = ezdxf.readfile(sys.argv[1])
center = (float(sys.argv[2]), float(sys.argv[3]))
angle, move = float(sys.argv[4]), (float(sys.argv[5]), float(sys.argv[6]))
first = member(doc, 1)[-1]
second = member(doc, 2)
hole = second[0] if second[0].contains(first.centroid) else None
if hole is None:
    material = second[-1]
elif len(second) > 1:
    material = second[-1].difference(hole)
else:
    x0, y0, x1, y1 = hole.bounds
    material = box(x0 - 1, y0 - 1, x1 + 1, y1 + 1).difference(hole)

result = []
for share in (0, 0.5, 1, 2):
    turned = affinity.rotate(material, share * angle, origin=center)
    turned = affinity.translate(turned, share * move[0], share * move[1])
    result.append({"gap": first.distance(turned), "overlap": first.intersection(turned).area})
json.dump(result, sys.stdout)
