import { dateSerial, readAt } from './readings';
import type { Draws } from './seededDraws';

/** Supply points of the invented network, with typical hardness (mmol/L) and chloride (mg/L). */
const points = [
  { name: 'East wells, raw', hardness: 3.24, chloride: 74 },
  { name: 'East works, outlet', hardness: 2.62, chloride: 61 },
  { name: 'Hill spring', hardness: 1.86, chloride: 14 },
  { name: 'Lake works, outlet', hardness: 1.42, chloride: 23 },
  { name: 'Upper reservoir', hardness: 1.64, chloride: 26 },
  { name: 'Lower reservoir', hardness: 2.18, chloride: 44 },
  { name: 'Mill Lane tap', hardness: 2.23, chloride: 46 },
  { name: 'Harbour tap', hardness: 2.71, chloride: 92 },
] as const;

export interface Sample { id: string; point: string; date: number; start: number; end: number }

interface Titration {
  prefix: string;
  count: number;
  firstDay: number;
  /** Volume used for a supply point, mL, blank included. */
  used: (point: { hardness: number; chloride: number }) => number;
  step: readonly [number, number];
}

/** First working day of the invented campaign: Monday 3 March 2025. */
export const campaignStart = dateSerial(2025, 3, 3);

/** Invented samples: eight points a day on working days, each with the two readings of one titration. */
export function samples(draws: Draws, titration: Titration): Sample[] {
  const [numerator, denominator] = titration.step;
  return Array.from({ length: titration.count }, (_, i) => {
    const point = points[i % points.length];
    const day = Math.floor(i / points.length);
    const scatter = draws.normal(1, 0.045);
    const start = readAt(draws.uniform() * 0.4, numerator, denominator);
    const end = readAt(start + titration.used({ hardness: point.hardness * scatter, chloride: point.chloride * scatter }), numerator, denominator);
    return {
      id: `${titration.prefix}-${String(i + 1).padStart(3, '0')}`,
      point: point.name,
      date: titration.firstDay + day + 2 * Math.floor(day / 5),
      start,
      end,
    };
  });
}
