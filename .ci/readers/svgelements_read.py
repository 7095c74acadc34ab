"""Reads an SVG file with svgelements and prints areas and lengths as JSON.

Usage: svgelements_read.py FILE PPI. With PPI 25.4 a pixel is a millimetre,
whatever unit the file is in.
"""
import json
import math
import sys

from svgelements import SVG, Arc, Circle, Close, CubicBezier, Line, Move, Path

svg = SVG.parse(sys.argv[1], ppi=float(sys.argv[2]), reify=True)


def steps(s):
    """Chords for a segment: 0.004 rad of an arc each, 6.7e-7 of its length."""
    if isinstance(s, Arc):
        return max(2, math.ceil(abs(s.sweep) / 0.004))
    return 200 if isinstance(s, CubicBezier) else 1


def measure(segments):
    """Area (y down) and length of a run of segments, curves sampled finely."""
    area = length = 0.0
    for s in segments:
        if isinstance(s, Move) or s.start is None or s.end is None:
            continue
        n = steps(s)
        pts = [s.start] + [s.point(i / n) for i in range(1, n)] + [s.end]
        for p, q in zip(pts, pts[1:]):
            area += (p.x * q.y - q.x * p.y) / 2
            length += math.hypot(q.x - p.x, q.y - p.y)
    return area, length


shapes = []
for e in svg.elements():
    if isinstance(e, (Path, Circle)):
        path = e if isinstance(e, Path) else Path(e)
        subs = []
        for sub in path.as_subpaths():
            segs = list(sub)
            area, length = measure(segs)
            subs.append({
                "area": area, "length": length,
                "closed": any(isinstance(s, Close) for s in segs),
                "pieces": sum(isinstance(s, (Line, Arc, CubicBezier)) and not isinstance(s, Close) for s in segs),
            })
        box = path.bbox()
        shapes.append({"id": e.id, "bbox": list(box), "subpaths": subs})

json.dump({"width": float(svg.width), "height": float(svg.height), "shapes": shapes}, sys.stdout)
