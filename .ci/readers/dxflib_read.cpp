// Prints the entities of a DXF file as dxflib sees them, one a line:
//   P layer closed n x y bulge x y bulge ...    L layer x y x y
//   A layer cx cy r from to                     C layer cx cy r
//   S layer degree knots n x y x y ...
// Build: g++ -O1 -o dxflib_read dxflib_read.cpp -ldxflib
#include <cstdio>
#include <string>
#include <vector>

#include <dxflib/dl_creationadapter.h>
#include <dxflib/dl_dxf.h>

class Printer : public DL_CreationAdapter {
    std::string open;  // the polyline or spline whose points are coming
    std::string layer() { return attributes.getLayer(); }
    void flush() { if (!open.empty()) std::puts(open.c_str()); open.clear(); }
    static std::string num(double x) { char b[40]; std::snprintf(b, sizeof b, " %.17g", x); return b; }
public:
    void addPolyline(const DL_PolylineData& d) override {
        flush();
        open = "P " + layer() + ((d.flags & 1) ? " 1 " : " 0 ") + std::to_string(d.number);
    }
    void addVertex(const DL_VertexData& v) override { open += num(v.x) + num(v.y) + num(v.bulge); }
    void addSpline(const DL_SplineData& d) override {
        flush();
        open = "S " + layer() + " " + std::to_string(d.degree) + " " + std::to_string(d.nKnots) + " " + std::to_string(d.nControl);
    }
    void addControlPoint(const DL_ControlPointData& p) override { open += num(p.x) + num(p.y); }
    void addLine(const DL_LineData& d) override {
        flush();
        std::puts(("L " + layer() + num(d.x1) + num(d.y1) + num(d.x2) + num(d.y2)).c_str());
    }
    void addArc(const DL_ArcData& d) override {
        flush();
        std::puts(("A " + layer() + num(d.cx) + num(d.cy) + num(d.radius) + num(d.angle1) + num(d.angle2)).c_str());
    }
    void addCircle(const DL_CircleData& d) override {
        flush();
        std::puts(("C " + layer() + num(d.cx) + num(d.cy) + num(d.radius)).c_str());
    }
    void endEntity() override { flush(); }
    void endSequence() override { flush(); }
    ~Printer() override { flush(); }
};

int main(int argc, char** argv) {
    if (argc != 2) return 2;
    Printer p;
    DL_Dxf dxf;
    return dxf.in(argv[1], &p) ? 0 : 1;
}
