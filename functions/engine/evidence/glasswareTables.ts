/** `piston` is the systematic error of a piston pipette, `piston random` its random error: a standard deviation. */
export const wares = ['flask', 'pipette', 'burette', 'cylinder', 'piston', 'piston random'] as const;
export type Ware = (typeof wares)[number];
export type GlassClass = 'A' | 'B';
export type GlassStandard = 'ISO' | 'ASTM';

/** One table of tolerances in mL: by capacity in mL, for burettes `capacity(division)`. */
export interface GlasswareTable {
  readonly ware: Ware;
  readonly standard: GlassStandard;
  /** Standard with its edition. */
  readonly title: string;
  /** False where the standard knows no classes; then only A holds figures. */
  readonly classes?: false;
  readonly A: Readonly<Record<string, number>>;
  readonly B: Readonly<Record<string, number>>;
  /** How sure each row is. */
  readonly provenance: (glassClass: GlassClass, capacity: number) => string;
}

const MEMORY = 'from memory, check against your standard or certificate';
const memory = (): string => MEMORY;

/** Twice class A. @source scope of ASTM E287, E288 and E694 */
const twice = (a: Readonly<Record<string, number>>): Record<string, number> =>
  Object.fromEntries(Object.entries(a).map(([size, tolerance]) => [size, Number((2 * tolerance).toPrecision(3))]));

const E288 = { 5: 0.02, 10: 0.02, 25: 0.03, 50: 0.05, 100: 0.08, 200: 0.1, 250: 0.12, 500: 0.2, 1000: 0.3, 2000: 0.5 };
const E969 = {
  0.5: 0.006, 1: 0.006, 2: 0.006, 3: 0.01, 4: 0.01, 5: 0.01, 6: 0.01, 7: 0.01, 8: 0.02, 9: 0.02, 10: 0.02, 15: 0.03, 20: 0.03, 25: 0.03, 30: 0.03,
  40: 0.05, 50: 0.05, 100: 0.08,
};
const E1272 = { 5: 0.05, 10: 0.1, 25: 0.17, 50: 0.25, 100: 0.5, 250: 1, 500: 2, 1000: 3, 2000: 6 };
const E287 = { 10: 0.02, 25: 0.03, 50: 0.05, 100: 0.1 };

/**
 * Tolerances of volumetric glassware. Rows that could not be told apart in memory are left out: ISO 385 below 25 mL, ISO 648 class B at
 * 1 mL and 100 mL, graduated pipettes, piston pipettes below 10 µL.
 */
export const glasswareTables: readonly GlasswareTable[] = [
  {
    ware: 'flask', standard: 'ISO', title: 'ISO 1042:1998',
    A: { 1: 0.025, 2: 0.025, 5: 0.025, 10: 0.025, 20: 0.04, 25: 0.04, 50: 0.06, 100: 0.1, 200: 0.15, 250: 0.15, 500: 0.25, 1000: 0.4, 2000: 0.6, 5000: 1.2 },
    B: { 1: 0.05, 2: 0.05, 5: 0.05, 10: 0.05, 20: 0.08, 25: 0.08, 50: 0.12, 100: 0.2, 200: 0.3, 250: 0.3, 500: 0.5, 1000: 0.8, 2000: 1.2, 5000: 2.4 },
    provenance: (glassClass, capacity) => (glassClass === 'A' && capacity >= 10 ? 'as in the German verification ordinance, annex 12' : MEMORY),
  },
  {
    ware: 'pipette', standard: 'ISO', title: 'ISO 648:2008',
    A: { 0.5: 0.005, 1: 0.008, 2: 0.01, 5: 0.015, 10: 0.02, 20: 0.03, 25: 0.03, 50: 0.05, 100: 0.08, 200: 0.1 },
    B: { 0.5: 0.01, 2: 0.02, 5: 0.03, 10: 0.04, 20: 0.06, 25: 0.06, 50: 0.1, 200: 0.2 },
    provenance: memory,
  },
  {
    ware: 'burette', standard: 'ISO', title: 'ISO 385:2005',
    A: { '25(0.05)': 0.03, '25(0.1)': 0.05, '50(0.1)': 0.05, '100(0.2)': 0.1 },
    B: { '25(0.05)': 0.05, '25(0.1)': 0.1, '50(0.1)': 0.1, '100(0.2)': 0.2 },
    provenance: memory,
  },
  {
    ware: 'cylinder', standard: 'ISO', title: 'ISO 4788:2005',
    A: { 5: 0.05, 10: 0.1, 25: 0.25, 50: 0.5, 100: 0.5, 250: 1, 500: 2.5, 1000: 5, 2000: 10 },
    B: { 5: 0.1, 10: 0.2, 25: 0.5, 50: 1, 100: 1, 250: 2, 500: 5, 1000: 10, 2000: 20 },
    provenance: memory,
  },
  {
    ware: 'piston', standard: 'ISO', title: 'ISO 8655-2:2002, systematic error', classes: false,
    A: { 0.01: 1.2e-4, 0.02: 2e-4, 0.05: 5e-4, 0.1: 8e-4, 0.2: 1.6e-3, 0.5: 4e-3, 1: 8e-3, 2: 0.016, 5: 0.04, 10: 0.06 },
    B: {}, provenance: memory,
  },
  {
    ware: 'piston random', standard: 'ISO', title: 'ISO 8655-2:2002, random error', classes: false,
    A: { 0.01: 8e-5, 0.02: 1e-4, 0.05: 2e-4, 0.1: 3e-4, 0.2: 6e-4, 0.5: 1.5e-3, 1: 3e-3, 2: 6e-3, 5: 0.015, 10: 0.03 },
    B: {}, provenance: memory,
  },
  { ware: 'flask', standard: 'ASTM', title: 'ASTM E288', A: E288, B: twice(E288), provenance: memory },
  { ware: 'pipette', standard: 'ASTM', title: 'ASTM E969', A: E969, B: twice(E969), provenance: memory },
  { ware: 'cylinder', standard: 'ASTM', title: 'ASTM E1272', A: E1272, B: twice(E1272), provenance: memory },
  { ware: 'burette', standard: 'ASTM', title: 'ASTM E287', A: E287, B: twice(E287), provenance: memory },
];
