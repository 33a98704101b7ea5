import type { Native } from '../native';
import { addresses } from './addresses';
import { allValues } from './allValues';
import { bases } from './bases';
import { betaFamily } from './betaFamily';
import { characters } from './characters';
import { choices } from './choices';
import { combinatorics } from './combinatorics';
import { complexNumbers } from './complexNumbers';
import { conditionalSums } from './conditionalSums';
import { conversions } from './conversions';
import { convert } from './convert';
import { counts } from './counts';
import { databases } from './databases';
import { dates } from './dates';
import { dateSpans } from './dateSpans';
import { elementary } from './elementary';
import { engineering } from './engineering';
import { errorFunction } from './errorFunction';
import { filtering } from './filtering';
import { finance } from './finance';
import { gammaFamily } from './gammaFamily';
import { hypothesisTests } from './hypothesisTests';
import { information } from './information';
import { lambdas } from './lambdas';
import { linest } from './linest';
import { logic } from './logic';
import { lookups } from './lookups';
import { matrices } from './matrices';
import { means } from './means';
import { moments } from './moments';
import { multiples } from './multiples';
import { normalFamily } from './normalFamily';
import { pairSums } from './pairSums';
import { quantiles } from './quantiles';
import { rankings } from './rankings';
import { ranks } from './ranks';
import { references } from './references';
import { regressions } from './regressions';
import { rounding } from './rounding';
import { shaping } from './shaping';
import { sorting } from './sorting';
import { spread } from './spread';
import { standardized } from './standardized';
import { straightLine } from './straightLine';
import { subtotals } from './subtotals';
import { sums } from './sums';
import { textPieces } from './textPieces';
import { texts } from './texts';
import { textSplit } from './textSplit';
import { tFamily } from './tFamily';
import { times } from './times';
import { trigonometry } from './trigonometry';
import { workdays } from './workdays';
import { writtenNumbers } from './writtenNumbers';

const table = new Map<string, Native>(
  [
    ...addresses, ...allValues, ...bases, ...betaFamily, ...characters, ...choices, ...combinatorics, ...complexNumbers,
    ...conditionalSums, ...conversions, ...convert, ...counts, ...databases, ...dates, ...dateSpans, ...elementary,
    ...engineering, ...errorFunction, ...filtering, ...finance, ...gammaFamily, ...hypothesisTests, ...information, ...lambdas,
    ...linest, ...logic, ...lookups, ...matrices, ...means, ...moments, ...multiples, ...normalFamily, ...pairSums,
    ...quantiles, ...rankings, ...ranks, ...references, ...regressions, ...rounding, ...shaping, ...sorting, ...spread,
    ...standardized, ...straightLine, ...subtotals, ...sums, ...textPieces, ...texts, ...textSplit, ...tFamily, ...times, ...trigonometry,
    ...workdays, ...writtenNumbers,
  ].map((native) => [native.name, native]),
);

/** The native function of that name (en-US, capitals), if it can be followed. */
export const nativeNamed = (name: string): Native | undefined => table.get(name);

/** All names that can be followed, sorted. */
export const nativeNames = (): string[] => [...table.keys()].sort();
