import type { SharedStrings } from './sharedStrings';
import { SheetWriter } from './SheetWriter';

export interface LookupTables { sheet: SheetWriter; temperatures: number[]; densities: number[] }

/** House limits of piston pipettes: nominal volume, largest systematic and random error, all in µL. */
export const pipetteLimits: readonly (readonly [number, number, number])[] = [
  [100, 0.8, 0.3], [200, 1.6, 0.6], [500, 4, 1.5], [1000, 8, 3], [5000, 40, 15], [10000, 60, 30],
];

/** The sheet of lookup tables: water density by temperature, and limits of pipettes. */
export function tablesSheet(strings: SharedStrings): LookupTables {
  const sheet = new SheetWriter('Tables', strings, { widths: { A: 18, B: 18, C: 4, D: 14, E: 18, F: 18 }, frozenAt: 'A6', tabColor: 'FF9AA5AB', showGridLines: false });
  sheet.text('A1', 'Tables', 'title');
  sheet.height(1, 26);
  sheet.text('A2', 'Density of air-free water at 101.325 kPa: M. Tanaka et al., Metrologia 38 (2001) 301, rounded to 0.01 kg/m³', 'note');
  sheet.merged('A4:B4', 'Water density', 'section');
  sheet.headings('A5', ['Temperature, °C', 'Density, kg/m³']);
  const temperatures = Array.from({ length: 31 }, (_, i) => 15 + i / 2);
  const densities = temperatures.map((temperature) => Math.round(waterDensity(temperature) * 100) / 100);
  temperatures.forEach((temperature, i) => {
    sheet.number(`A${6 + i}`, temperature, 'one');
    sheet.number(`B${6 + i}`, densities[i], 'two');
  });
  sheet.merged('D4:F4', 'House limits for piston pipettes', 'section');
  sheet.headings('D5', ['Nominal, µL', 'Systematic, µL', 'Random, µL']);
  pipetteLimits.forEach((line, i) => line.forEach((value, j) => sheet.number(`${'DEF'[j]}${6 + i}`, value, j === 0 ? 'label' : 'one')));
  return { sheet, temperatures, densities };
}

/**
 * Density of water, kg/m³, from 0 to 40 °C.
 * @source M. Tanaka et al., Metrologia 38 (2001) 301-309, equation (1).
 */
function waterDensity(t: number): number {
  return 999.97495 * (1 - ((t - 3.983035) ** 2 * (t + 301.797)) / (522528.9 * (t + 69.34881)));
}
