import type { Native } from '../native';
import { choices } from './choices';
import { conditionalSums } from './conditionalSums';
import { conversions } from './conversions';
import { counts } from './counts';
import { elementary } from './elementary';
import { information } from './information';
import { linest } from './linest';
import { logic } from './logic';
import { lookups } from './lookups';
import { ranks } from './ranks';
import { references } from './references';
import { rounding } from './rounding';
import { spread } from './spread';
import { straightLine } from './straightLine';
import { sums } from './sums';
import { texts } from './texts';
import { trigonometry } from './trigonometry';

const table = new Map<string, Native>(
  [
    ...choices, ...conditionalSums, ...conversions, ...counts, ...elementary, ...information, ...linest, ...logic,
    ...lookups, ...ranks, ...references, ...rounding, ...spread, ...straightLine, ...sums, ...texts, ...trigonometry,
  ].map((native) => [native.name, native]),
);

/** The native function of that name (en-US, capitals), if it can be followed. */
export const nativeNamed = (name: string): Native | undefined => table.get(name);

/** All names that can be followed, sorted. */
export const nativeNames = (): string[] => [...table.keys()].sort();
