import { average, readAt, sampleDeviation } from './readings';
import { seededDraws } from './seededDraws';
import type { SharedStrings } from './sharedStrings';
import { SheetWriter } from './SheetWriter';
import { pipetteLimits } from './tablesSheet';
import type { LookupTables } from './tablesSheet';
import { quantity } from './titrantSheet';

/** Gravimetric check of a piston pipette: ten weighings, water density by interpolation in a table. */
export function pipetteSheet(tables: LookupTables, strings: SharedStrings): SheetWriter {
  const sheet = new SheetWriter('Pipette check', strings, {
    widths: { A: 40, B: 14, C: 14, D: 14, E: 16, F: 3, G: 13, H: 13, I: 14, J: 12, K: 12, L: 12, M: 24, N: 12, O: 30 }, tabColor: 'FF8A6D3B', showGridLines: false,
  });
  const nominal = 1000;
  const temperature = 21.3;
  const pressure = 1008.4;
  const humidity = 48;
  const weights = 8000;
  const expansion = 0.00024;
  sheet.text('A1', 'Gravimetric check of a piston pipette', 'title');
  sheet.height(1, 26);
  sheet.text('A2', 'Pipette PP-1000-04, nominal volume 1000 µL, tip lot T-311. Checked on 2025-03-05.', 'note');

  sheet.merged('A4:E4', 'Conditions', 'section');
  sheet.headings('A5', ['Quantity', 'Symbol', 'Value', 'Unit', 'Equipment'], 20);
  quantity(sheet, 6, 'Nominal volume', 'V0', 'µL', 'PP-1000-04');
  sheet.number('C6', nominal, 'entry');
  quantity(sheet, 7, 'Water temperature', 't', '°C', 'THE-03');
  sheet.number('C7', temperature, 'entry1');
  quantity(sheet, 8, 'Air pressure', 'p', 'hPa', 'BAR-01');
  sheet.number('C8', pressure, 'entry1');
  quantity(sheet, 9, 'Relative humidity', 'h', '%', 'HYG-01');
  sheet.number('C9', humidity, 'entry');
  quantity(sheet, 10, 'Density of water (table)', 'ρw', 'kg/m³', '');
  const place = tables.temperatures.findIndex((_, i) => tables.temperatures[i + 1] > temperature);
  const [t0, t1] = [tables.temperatures[place], tables.temperatures[place + 1]];
  const [d0, d1] = [tables.densities[place], tables.densities[place + 1]];
  const match = 'MATCH(C7,Tables!$A$6:$A$36,1)';
  const below = (column: string): string => `INDEX(Tables!$${column}$6:$${column}$36,${match})`;
  const above = (column: string): string => `INDEX(Tables!$${column}$6:$${column}$36,${match}+1)`;
  const water = sheet.formula('C10',
    `${below('B')}+(C7-${below('A')})/(${above('A')}-${below('A')})*(${above('B')}-${below('B')})`,
    d0 + ((temperature - t0) / (t1 - t0)) * (d1 - d0), 'three');
  quantity(sheet, 11, 'Density of air', 'ρa', 'kg/m³', '');
  const air = sheet.formula('C11', '(0.34848*C8-0.009*C9*EXP(0.061*C7))/(273.15+C7)',
    (0.34848 * pressure - 0.009 * humidity * Math.exp(0.061 * temperature)) / (273.15 + temperature), 'four');
  quantity(sheet, 12, 'Density of the balance weights', 'ρb', 'kg/m³', '');
  sheet.number('C12', weights, 'entry');
  quantity(sheet, 13, 'Z factor', 'Z', 'µL/mg', '');
  const z = sheet.formula('C13', '1000*(1-C11/C12)/(C10-C11)', (1000 * (1 - air / weights)) / (water - air), 'five');
  quantity(sheet, 14, 'Cubic expansion of the pipette', 'γ', '1/°C', '');
  sheet.number('C14', expansion, 'entry5');
  quantity(sheet, 15, 'Correction to 20 °C', 'Y', '1', '');
  const correction = sheet.formula('C15', '1-C14*(C7-20)', 1 - expansion * (temperature - 20), 'five');

  sheet.merged('A17:E17', 'Weighings', 'section');
  sheet.headings('A18', ['Delivery', 'Before, g', 'After, g', 'Mass, mg', 'Volume, µL'], 20);
  const draws = seededDraws(1000_04);
  let vessel = 18.27341;
  const masses: number[] = [];
  const volumes: number[] = [];
  for (let i = 0; i < 10; i += 1) {
    const row = 19 + i;
    const before = readAt(vessel, 1, 100_000);
    const after = readAt(before + draws.normal(0.99838, 0.0009), 1, 100_000);
    // Between two deliveries some water leaves the open vessel.
    vessel = after - 0.00004 * (1 + draws.uniform());
    sheet.number(`A${row}`, i + 1, 'center');
    sheet.number(`B${row}`, before, 'entry5');
    sheet.number(`C${row}`, after, 'entry5');
    masses.push((after - before) * 1000);
    volumes.push((after - before) * 1000 * z * correction);
  }
  sheet.fillDown('D', 19, '(C19-B19)*1000', masses, 'two');
  sheet.fillDown('E', 19, 'D19*$C$13*$C$15', volumes, 'two');

  sheet.merged('A30:E30', 'Result', 'section');
  sheet.headings('A31', ['Quantity', 'Symbol', 'Value', 'Unit', 'Limit'], 20);
  const limits = pipetteLimits.find(([volume]) => volume === nominal)!;
  quantity(sheet, 32, 'Mean volume at 20 °C', 'V', 'µL', '');
  const mean = sheet.formula('C32', 'AVERAGE(E19:E28)', average(volumes), 'result2');
  row(33, 'Systematic error', 'es', 'µL');
  const error = sheet.formula('C33', 'C32-C6', mean - nominal, 'result2');
  sheet.formula('E33', 'VLOOKUP(C6,Tables!$D$6:$F$11,2,FALSE)', limits[1], 'one');
  quantity(sheet, 34, 'Systematic error, relative', 'es', '%', '');
  sheet.formula('C34', 'C33/C6*100', (error / nominal) * 100, 'two');
  row(35, 'Random error (standard deviation)', 's', 'µL');
  const deviation = sheet.formula('C35', '_xlfn.STDEV.S(E19:E28)', sampleDeviation(volumes), 'result2');
  sheet.formula('E35', 'VLOOKUP(C6,Tables!$D$6:$F$11,3,FALSE)', limits[2], 'one');
  quantity(sheet, 36, 'Random error, relative', 'CV', '%', '');
  sheet.formula('C36', 'C35/C32*100', (deviation / mean) * 100, 'two');
  quantity(sheet, 37, 'Verdict without doubt considered', '', '', '');
  sheet.formula('C37', 'IF(AND(ABS(C33)<=E33,C35<=E35),"pass","fail")',
    Math.abs(error) <= limits[1] && deviation <= limits[2] ? 'pass' : 'fail', 'resultText');
  return sheet;

  /** A row whose last column holds a limit. */
  function row(place: number, label: string, symbol: string, unit: string): void {
    sheet.text(`A${place}`, label, 'label');
    sheet.text(`B${place}`, symbol, 'center');
    sheet.text(`D${place}`, unit, 'center');
  }
}
