import { png } from './png';

type Point = readonly [x: number, y: number];
type Color = readonly [red: number, green: number, blue: number];

const ground: Color = [0x15, 0x50, 0x5c];
const white: Color = [0xff, 0xff, 0xff];
const amber: Color = [0xff, 0xc8, 0x57];

/** A stroke of round ends and joints. Lengths are parts of the icon's width. */
interface Stroke {
  readonly path: readonly Point[];
  readonly color: Color;
  readonly width: number;
}

/** The root sign, its bar reaching over the sum. */
const root: readonly Point[] = [[0.12, 0.58], [0.2, 0.53], [0.32, 0.81], [0.46, 0.2], [0.87, 0.2]];
const sum: readonly Point[] = [[0.81, 0.38], [0.54, 0.38], [0.68, 0.575], [0.54, 0.77], [0.81, 0.77]];

/** Corner radius of the ground. */
const corner = 0.2;

/** The finest detail that a small icon can show is about a pixel and a half. */
const strokeWidth = (size: number): number => Math.max(0.085, 1.5 / size);

/**
 * The add-in's icon as a PNG file: a root sign over a sum, on a ground with round corners, so that it shows on light and dark ribbons.
 *
 * @param size   Width and height in pixels.
 */
export function icon(size: number): Uint8Array {
  const width = strokeWidth(size);
  return draw(size, ground, [{ path: root, color: white, width }, { path: sum, color: amber, width }]);
}

/** The same sign in white without a ground, as the unified manifest demands beside the coloured one. */
export function outlineIcon(size: number): Uint8Array {
  const width = strokeWidth(size);
  return draw(size, undefined, [{ path: root, color: white, width }, { path: sum, color: white, width }]);
}

/** Samples along each side of a pixel: 64 a pixel smooth the edges to a 64th. */
const finer = 8;

function draw(size: number, background: Color | undefined, strokes: readonly Stroke[]): Uint8Array {
  const pixels = new Uint8Array(size * size * 4);
  for (let y = 0; y < size; y++) {
    for (let x = 0; x < size; x++) {
      const total = [0, 0, 0];
      let opaque = 0;
      for (let k = 0; k < finer * finer; k++) {
        const point: Point = [(x + ((k % finer) + 0.5) / finer) / size, (y + (Math.floor(k / finer) + 0.5) / finer) / size];
        const color = strokes.find(({ path, width }) => isOnPath(point, path, width / 2))?.color ?? (isOnGround(point) ? background : undefined);
        if (!color) continue;
        opaque++;
        color.forEach((channel, i) => (total[i] += channel));
      }
      if (opaque === 0) continue;
      pixels.set([...total.map((channel) => Math.round(channel / opaque)), Math.round((255 * opaque) / (finer * finer))], (y * size + x) * 4);
    }
  }
  return png({ width: size, height: size, pixels });
}

function isOnGround([x, y]: Point): boolean {
  const dx = Math.max(corner - x, x - (1 - corner), 0);
  const dy = Math.max(corner - y, y - (1 - corner), 0);
  return dx * dx + dy * dy <= corner * corner;
}

const isOnPath = (point: Point, path: readonly Point[], reach: number): boolean =>
  path.slice(1).some((end, i) => squaredDistance(point, path[i], end) <= reach * reach);

/** From a point to a segment. */
function squaredDistance([x, y]: Point, [ax, ay]: Point, [bx, by]: Point): number {
  const [ux, uy] = [bx - ax, by - ay];
  const t = Math.min(1, Math.max(0, ((x - ax) * ux + (y - ay) * uy) / (ux * ux + uy * uy)));
  return (x - ax - t * ux) ** 2 + (y - ay - t * uy) ** 2;
}
