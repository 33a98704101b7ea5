import type { SharedStrings } from './sharedStrings';
import { SheetWriter } from './SheetWriter';
import type { StyleName } from './styles';

type Entry = string | number | { formula: string; value: number };

interface Section {
  title: string;
  /** Headings of columns D to G; the others are the same everywhere. */
  evidence: readonly [string, string, string, string];
  styles: readonly [StyleName, StyleName, StyleName, StyleName];
  /** Id, item, used for, four evidence cells, applies to, record. */
  lines: readonly (readonly [string, string, string, Entry, Entry, Entry, Entry, string, string])[];
}

const everyUse = 'every use';
const eachReading = 'each reading';

/** Quarter, standard deviation of one titration in mL, readings: EDTA, then silver nitrate. */
const repeatability = [
  [['2nd quarter', 0.0312, 12], ['3rd quarter', 0.0274, 14], ['4th quarter', 0.0341, 10]],
  [['2nd quarter', 0.0482, 10], ['3rd quarter', 0.0415, 11], ['4th quarter', 0.0537, 9]],
] as const;

/** The list of equipment and of its evidence. Sections stand one below the other; one empty row lies between them. */
const sections: readonly Section[] = [
  {
    title: 'Volumetric glassware: tolerance at 20 °C',
    evidence: ['Nominal, mL', 'Tolerance ±, mL', 'Class', 'Standard'],
    styles: ['entry', 'entry3', 'center', 'center'],
    lines: [
      ['FL-1000-01', 'Volumetric flask 1000 mL', 'CaCO3 standard', 1000, 0.4, 'A', 'ISO 1042', everyUse, 'lot 23-118'],
      ['FL-1000-02', 'Volumetric flask 1000 mL', 'NaCl standard', 1000, 0.4, 'A', 'ISO 1042', everyUse, 'lot 23-118'],
      ['PI-25-01', 'Bulb pipette 25 mL', 'CaCO3 aliquot', 25, 0.03, 'AS', 'ISO 648', everyUse, 'lot 22-074'],
      ['PI-20-01', 'Bulb pipette 20 mL', 'NaCl aliquot', 20, 0.03, 'AS', 'ISO 648', everyUse, 'lot 22-071'],
      ['PI-100-01', 'Bulb pipette 100 mL', 'Hardness samples', 100, 0.08, 'AS', 'ISO 648', everyUse, 'lot 24-009'],
      ['PI-100-02', 'Bulb pipette 100 mL', 'Chloride samples', 100, 0.08, 'AS', 'ISO 648', everyUse, 'lot 24-009'],
      ['BU-50-01', 'Burette 50 mL, division 0.1 mL', 'EDTA titrations', 50, 0.05, 'AS', 'ISO 385', everyUse, 'lot 21-330'],
      ['BU-25-01', 'Burette 25 mL, division 0.1 mL', 'Silver nitrate titrations', 25, 0.05, 'AS', 'ISO 385', everyUse, 'lot 21-335'],
    ],
  },
  {
    title: 'Certificates: expanded uncertainty',
    evidence: ['Unit', 'Expanded U', 'Coverage k', 'Valid until'],
    styles: ['center', 'entry', 'entry', 'center'],
    lines: [
      ['BAL-02', 'Analytical balance, 0.1 mg', 'Titrant weighings', 'g', 0.0003, 2, '2026-01', eachReading, 'Cert. 24-0871'],
      ['BAL-05', 'Semi-micro balance, 0.01 mg', 'Pipette check', 'g', 0.00006, 2, '2026-01', eachReading, 'Cert. 24-0874'],
      ['THE-03', 'Thermometer', 'Pipette check', '°C', 0.1, 2, '2025-11', everyUse, 'Cert. 24-1310'],
      ['BAR-01', 'Barometer', 'Pipette check', 'hPa', 0.6, 2, '2026-06', everyUse, 'Cert. 24-0416'],
      ['HYG-01', 'Hygrometer', 'Pipette check', '%', 3, 2, '2025-11', everyUse, 'Cert. 24-1311'],
      ['RM-NACL', 'Sodium chloride reference material', 'Silver titrant', 'g/g', 0.0004, 2, '2027-03', everyUse, 'Cert. RM-5518'],
    ],
  },
  {
    title: 'Resolution of readings',
    evidence: ['Unit', 'Division', 'Readable part', 'Display'],
    styles: ['center', 'entry', 'entry', 'center'],
    lines: [
      ['BAL-02', 'Analytical balance, 0.1 mg', 'Titrant weighings', 'g', 0.0001, 1, 'digital', eachReading, 'Manual, p. 12'],
      ['BAL-05', 'Semi-micro balance, 0.01 mg', 'Pipette check', 'g', 0.00001, 1, 'digital', eachReading, 'Manual, p. 9'],
      ['BU-50-01', 'Burette 50 mL, division 0.1 mL', 'EDTA titrations', 'mL', 0.1, 0.2, 'scale', eachReading, 'read to 0.02 mL'],
      ['BU-25-01', 'Burette 25 mL, division 0.1 mL', 'Silver nitrate titrations', 'mL', 0.1, 0.5, 'scale', eachReading, 'read to 0.05 mL'],
      ['THE-03', 'Thermometer', 'Pipette check', '°C', 0.1, 1, 'digital', eachReading, 'Manual, p. 3'],
    ],
  },
  {
    title: 'Purity: limits',
    evidence: ['Unit', 'Lower limit', 'Upper limit', 'Dried at'],
    styles: ['center', 'entryPercent', 'entryPercent', 'center'],
    lines: [['RM-CACO3', 'Calcium carbonate, primary standard', 'EDTA titrant', 'g/g', 0.9995, 1, '110 °C, 2 h', everyUse, 'Cert. RM-2046']],
  },
  {
    title: 'Room temperature: 20 °C ± half-range, one room for all glassware (burettes: standard and samples alike, their effects cancel)',
    evidence: ['Volume, mL', 'Half-range, °C', 'Liquid', 'Glass'],
    styles: ['entry', 'entry1', 'center', 'center'],
    lines: ([
      ['Volumetric flask, both standards', 1000], ['Bulb pipette, CaCO3 aliquot', 25], ['Bulb pipette, NaCl aliquot', 20], ['Bulb pipette, samples', 100],
    ] as const).map(([item, volume]) => ['ROOM-T', item, 'Volumes at room temperature', volume, 3, 'water', 'borosilicate', everyUse, 'Log sheet T-7']),
  },
  ...(['EDTA', 'silver nitrate'] as const).map((titrant, i): Section => ({
    title: `Repeatability of one ${titrant} titration: control charts`,
    evidence: ['Unit', 'Deviation s', 'Readings n', 'n − 1'],
    styles: ['center', 'entry4', 'entry', 'whole'],
    lines: repeatability[i].map(([quarter, s, n]) => [`REP-${i === 0 ? 'EDTA' : 'AG'}`, `Control solution, ${quarter}`, `One ${titrant} titration`,
      'mL', s, n, { formula: 'F#-1', value: n - 1 }, eachReading, `Chart ${i === 0 ? 'H' : 'C'}-2024`]),
  })),
  {
    title: 'Molar masses: from the standard atomic weights (half-width: half the interval of all atoms together)',
    evidence: ['Formula', 'Value, g/mol', 'Half-width, g/mol', 'Year'],
    styles: ['center', 'entry3', 'entry3', 'center'],
    lines: [
      ['AW-CA', 'Calcium carbonate', 'EDTA titrant and hardness', 'CaCO3', 100.086, 0.006, 2021, everyUse, 'CIAAW table'],
      ['AW-CL', 'Sodium chloride', 'Silver titrant', 'NaCl', 58.44, 0.006, 2021, everyUse, 'CIAAW table'],
      ['AW-CL', 'Chloride', 'Chloride results', 'Cl', 35.45, 0.006, 2021, everyUse, 'CIAAW table'],
    ],
  },
];

/** The evidence of the laboratory. Columns K to O stay free: that is where standard uncertainties may be added. */
export function equipmentSheet(strings: SharedStrings): SheetWriter {
  const sheet = new SheetWriter('Equipment', strings, {
    widths: { A: 13, B: 38, C: 28, D: 13, E: 16, F: 15, G: 14, H: 14, I: 18, J: 3, K: 13, L: 10, M: 14, N: 14, O: 14 },
    frozenAt: 'B4', tabColor: 'FF6B5B95', landscape: true, showGridLines: false,
  });
  sheet.text('A1', 'Equipment and evidence', 'title');
  sheet.height(1, 26);
  sheet.text('A2', 'Invented laboratory: lots, certificates and records are made up. "Each reading": the doubt is a new one at every reading. '
    + '"Every use": the same doubt whenever the item is used.', 'note');
  let row = 4;
  for (const section of sections) {
    sheet.merged(`A${row}:I${row}`, section.title, 'section');
    sheet.headings(`A${row + 1}`, ['Id', 'Item', 'Used for', ...section.evidence, 'Applies to', 'Record'], 20);
    row += 2;
    for (const line of section.lines) {
      line.forEach((entry, i) => write(`${'ABCDEFGHI'[i]}${row}`, entry, i > 2 && i < 7 ? section.styles[i - 3] : i > 6 ? 'center' : 'label'));
      row += 1;
    }
    row += 1;
  }
  return sheet;

  function write(address: string, entry: Entry, style: StyleName): void {
    if (typeof entry === 'string') sheet.text(address, entry, style);
    else if (typeof entry === 'number') sheet.number(address, entry, style);
    else sheet.formula(address, entry.formula.replace('#', String(row)), entry.value, style);
  }
}
