"""Points along a closed polyline or circle of a DXF file, arcs taken apart finely."""
import ezdxf

CLOSED = 1e-8  # drawing units, ten steps of the files' last decimal


def flat(e, chord):
    if e.dxftype() == "CIRCLE":
        return list(e.flattening(chord))
    points = []
    for part in e.virtual_entities():
        if part.dxftype() == "ARC":
            v = list(part.flattening(chord))
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
