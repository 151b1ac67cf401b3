import { cos, sin } from "../numeric/elementary.ts";

/** A tape laid over bedding, every angle in degrees. */
export interface TapeOverBedding {
  /** Direction in which the tape's readings grow, clockwise from north (0 to 360). */
  readonly tapeBearing: number;
  /** Angle of the tape with the horizontal in that direction, up positive (-90 to 90). */
  readonly tapeSlope: number;
  /** Angle of bedding with the horizontal (0 to 90). */
  readonly dip: number;
  /** Direction in which bedding dips, clockwise from the same north as the tape's bearing (0 to 360). */
  readonly dipDirection: number;
  /** True where the beds' younger side faces down. */
  readonly isOverturned: boolean;
}

const radians = (degrees: number): number => (degrees * Math.PI) / 180;

/**
 * Stratigraphic thickness gained for each unit of tape, from -1 to 1: positive where the tape leads into younger beds.
 * Assumes that bedding is planar, and the tape straight, over the stretch.
 *
 *     n = (sin d sin a, sin d cos a, cos d)       upward pole to bedding of dip d towards a (east, north, up)
 *     t = (cos s sin b, cos s cos b, sin s)       along a tape of bearing b and slope s
 *     gain = n . t = cos d sin s + sin d cos s cos(b - a), its sign turned where beds are overturned
 *
 * Its size is the thickness formula of a traverse oblique to strike and slope, |sin d cos s sin(angle between strike and
 * tape) +- cos d sin s| (from memory: Mertie 1922, USGS Professional Paper 129-C; Compton 1985, Geology in the Field;
 * Ragan 2009, Structural Geology, 4th edition, chapter on thickness). Throws on an angle outside its range.
 *
 * @example Beds that dip 30 degrees east, a level tape due east: 10 m of tape gain 10 sin 30 = 5 m.
 */
export function thicknessAlongTape(tape: TapeOverBedding): number {
  const { tapeBearing, tapeSlope, dip, dipDirection, isOverturned } = tape;
  within("tape bearing", tapeBearing, [0, 360]);
  within("tape slope", tapeSlope, [-90, 90]);
  within("dip", dip, [0, 90]);
  within("dip direction", dipDirection, [0, 360]);
  const [s, d] = [radians(tapeSlope), radians(dip)];
  const gain = cos(d) * sin(s) + sin(d) * cos(s) * cos(radians(tapeBearing - dipDirection));
  return isOverturned ? 0 - gain : gain;
}

function within(name: string, angle: number, [low, high]: readonly [number, number]): void {
  if (!(angle >= low && angle <= high))
    throw new RangeError(
      `thickness-along-tape.ts: expected a ${name} from ${low} to ${high} degrees, got ${angle}`,
    );
}
