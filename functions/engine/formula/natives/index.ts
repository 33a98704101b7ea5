import type { Native } from '../native';
import { addresses } from './addresses';
import { choices } from './choices';
import { conditionalSums } from './conditionalSums';
import { conversions } from './conversions';
import { counts } from './counts';
import { elementary } from './elementary';
import { filtering } from './filtering';
import { information } from './information';
import { lambdas } from './lambdas';
import { linest } from './linest';
import { logic } from './logic';
import { lookups } from './lookups';
import { matrices } from './matrices';
import { ranks } from './ranks';
import { references } from './references';
import { rounding } from './rounding';
import { shaping } from './shaping';
import { sorting } from './sorting';
import { spread } from './spread';
import { straightLine } from './straightLine';
import { sums } from './sums';
import { texts } from './texts';
import { trigonometry } from './trigonometry';

const table = new Map<string, Native>(
  [
    ...addresses, ...choices, ...conditionalSums, ...conversions, ...counts,
    ...elementary, ...filtering, ...information, ...lambdas, ...linest, ...logic, ...lookups,
    ...matrices, ...ranks, ...references, ...rounding, ...shaping, ...sorting, ...spread, ...straightLine,
    ...sums, ...texts, ...trigonometry,
  ].map((native) => [native.name, native]),
);

/** The native function of that name (en-US, capitals), if it can be followed. */
export const nativeNamed = (name: string): Native | undefined => table.get(name);

/** All names that can be followed, sorted. */
export const nativeNames = (): string[] => [...table.keys()].sort();
