import { DxfWriter, LWPolylineFlags, point2d, point3d, Units, type LWPolylineVertex } from '@tarikjabiri/dxf';
import type { Arc, Curve, Point } from '@/engine';
import type { CuttingLayout, CuttingLine } from '../cutting/layout';
import { inParts, turnOf, written } from '../cutting/numbers';
import { WORKS } from '../cutting/works';

/**
 * A layout as DXF for cutting machines: millimetres, y up, the lower left corner of the whole at 0, 0. Layers CUT, SCORE and DRAW;
 * mountain scores have a colour of their own. A closed line is one closed LWPOLYLINE, its arcs as bulges; any other is a LINE or
 * an ARC.
 */
export function cuttingDxf({ across, along, lines }: CuttingLayout): string {
  const dxf = new DxfWriter();
  dxf.setUnits(Units.Millimeters);
  dxf.setVariable('$MEASUREMENT', { 70: 1 });
  dxf.setVariable('$EXTMIN', { 10: 0, 20: 0, 30: 0 });
  dxf.setVariable('$EXTMAX', { 10: written(across), 20: written(along), 30: 0 });
  for (const work of ['cut', 'valley', 'glue'] as const)
    dxf.addLayer(WORKS[work].layer, WORKS[work].index, 'Continuous');
  const up = ({ x, y }: Point): Point => ({ x: written(x), y: written(along - y) });
  for (const line of lines) {
    if (line.closed) addClosed(dxf, line, up);
    else for (const curve of line.curves) addOpen(dxf, curve, { line, up });
  }
  return `${dxf.stringify()}\n`;
}

type Up = (point: Point) => Point;

function addClosed(dxf: DxfWriter, { work, curves }: CuttingLine, up: Up): void {
  const vertices = curves
    // Half a turn is a bulge of 1; a whole one would be endless.
    .flatMap((curve) => inParts(curve, Math.PI))
    .map((curve): LWPolylineVertex => {
      const { x, y } = up(curve.from);
      return { point: point2d(x, y), ...(curve.type === 'arc' ? { bulge: bulgeOf(curve) } : {}) };
    });
  dxf.addLWPolyline(vertices, { flags: LWPolylineFlags.Closed, layerName: WORKS[work].layer });
}

/** The tangent of a quarter of the turn, positive anticlockwise (DXF Reference, LWPOLYLINE, group 42). */
const bulgeOf = (arc: Arc): number => written((arc.clockwise ? -1 : 1) * Math.tan(turnOf(arc) / 4));

function addOpen(dxf: DxfWriter, curve: Curve, { line: { work }, up }: { line: CuttingLine; up: Up }): void {
  const { layer, index } = WORKS[work];
  const options = { layerName: layer, ...(work === 'mountain' ? { colorNumber: index } : {}) };
  const [from, to] = [up(curve.from), up(curve.to)];
  if (curve.type === 'line') {
    dxf.addLine(point3d(from.x, from.y), point3d(to.x, to.y), options);
    return;
  }
  const centre = up(curve.centre);
  // An ARC runs anticlockwise, in degrees.
  const [begin, end] = curve.clockwise ? [curve.to, curve.from] : [curve.from, curve.to];
  const degrees = ({ x, y }: Point) => written((Math.atan2(curve.centre.y - y, x - curve.centre.x) * 180) / Math.PI);
  dxf.addArc(point3d(centre.x, centre.y), written(curve.radius), degrees(begin), degrees(end), options);
}
