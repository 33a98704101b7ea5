/** A unit as CONVERT names it: what it measures and its size, times a power of ten, in the base unit of that. */
export interface Unit {
  readonly measures: 'mass' | 'length' | 'time' | 'pressure' | 'energy' | 'volume' | 'temperature';
  /** In g, m, s, Pa, J, l; for temperatures see `convert`. */
  readonly size: number;
  readonly power: number;
}

/** Pound in g, gallons in l. */
const POUND = 453.59237;
const GALLON = 3.785411784;
const UK_GALLON = 4.54609;

/** Pound-force in N: the pound under the standard acceleration of free fall, 9.80665 m/s² (3rd CGPM, 1901). */
const POUND_FORCE = 4.4482216152605;

/** Horsepower-hour: 550 foot pound-force in a second, for an hour. */
const HORSEPOWER_HOUR = 550 * POUND_FORCE * 0.3048 * 3600;

/**
 * Units whose size is exact by definition, without prefixes. Units of CONVERT that rest on measured constants (u, eV) or on a
 * density (mmHg) are left out on purpose: the sheet's figures for them are not documented.
 *
 * @source yard and pound: International Yard and Pound Agreement of 1959; inch, foot, mile, ounce, grain, hundredweight, ton, gallon
 *         and their parts: NIST Special Publication 811 (2008), appendix B; imperial gallon: UK Weights and Measures Act 1985;
 *         litre, day, angstrom, nautical mile, standard atmosphere: SI Brochure and NIST SP 811; torr = atm/760;
 *         calories (thermochemical c, International Table cal) and Btu (International Table): ISO 31-4:1992, annexes
 */
const tables: Record<Exclude<Unit['measures'], 'temperature'>, Record<string, number>> = {
  mass: {
    g: 1, lbm: POUND, ozm: POUND / 16, grain: 0.06479891, stone: 6350.29318, cwt: 45359.237, shweight: 45359.237, ton: 907184.74,
    uk_cwt: 50802.34544, lcwt: 50802.34544, hweight: 50802.34544, uk_ton: 1016046.9088, LTON: 1016046.9088, brton: 1016046.9088,
    sg: (1000 * POUND_FORCE) / 0.3048,
  },
  length: {
    m: 1, in: 0.0254, ft: 0.3048, yd: 0.9144, mi: 1609.344, Nmi: 1852, ang: 1e-10, ell: 1.143,
    pica: 0.0254 / 6, Pica: 0.0254 / 72, Picapt: 0.0254 / 72,
  },
  time: { s: 1, sec: 1, mn: 60, min: 60, hr: 3600, d: 86400, day: 86400, yr: 31557600 },
  pressure: { Pa: 1, p: 1, atm: 101325, at: 101325, Torr: 101325 / 760, psi: POUND_FORCE / 0.0254 ** 2 },
  energy: {
    J: 1, e: 1e-7, c: 4.184, cal: 4.1868, Wh: 3600, wh: 3600, BTU: 1055.05585262, btu: 1055.05585262, HPh: HORSEPOWER_HOUR, hh: HORSEPOWER_HOUR,
  },
  volume: {
    l: 1, L: 1, lt: 1, m3: 1000, 'm^3': 1000, ang3: 1e-27, 'ang^3': 1e-27, in3: 0.016387064, 'in^3': 0.016387064,
    ft3: 28.316846592, 'ft^3': 28.316846592, yd3: 764.554857984, 'yd^3': 764.554857984, mi3: 4168181825440.5796, 'mi^3': 4168181825440.5796,
    gal: GALLON, qt: GALLON / 4, pt: GALLON / 8, us_pt: GALLON / 8, cup: GALLON / 16, oz: GALLON / 128, tbs: GALLON / 256, tsp: GALLON / 768,
    tspm: 0.005, uk_gal: UK_GALLON, uk_qt: UK_GALLON / 4, uk_pt: UK_GALLON / 8, barrel: 158.987294928,
  },
};

const TEMPERATURES = ['C', 'cel', 'F', 'fah', 'K', 'kel', 'Rank', 'Reau'];

/** Units that take the decimal prefixes; m3 takes them cubed. */
const PREFIXABLE = new Set(['g', 'm', 's', 'sec', 'Pa', 'p', 'J', 'c', 'cal', 'Wh', 'wh', 'l', 'L', 'lt', 'm3', 'm^3']);

const PREFIXES: Record<string, number> = {
  Y: 24, Z: 21, E: 18, P: 15, T: 12, G: 9, M: 6, k: 3, h: 2, da: 1, e: 1, d: -1, c: -2, m: -3, u: -6, n: -9, p: -12, f: -15, a: -18, z: -21, y: -24,
};

const units = new Map<string, Unit>([
  ...Object.entries(tables).flatMap(([measures, sizes]) =>
    Object.entries(sizes).map(([name, size]): [string, Unit] => [name, { measures: measures as Unit['measures'], size, power: 0 }])),
  ...TEMPERATURES.map((name): [string, Unit] => [name, { measures: 'temperature', size: 1, power: 0 }]),
]);

/** The unit of that name, with its prefix if it has one; names are case-sensitive. Undefined if it is not known here. */
export function unitNamed(name: string): Unit | undefined {
  const plain = units.get(name);
  if (plain) return plain;
  for (const [prefix, power] of Object.entries(PREFIXES)) {
    const rest = name.slice(prefix.length);
    if (!name.startsWith(prefix) || !PREFIXABLE.has(rest)) continue;
    return { ...units.get(rest)!, power: rest === 'm3' || rest === 'm^3' ? 3 * power : power };
  }
  return undefined;
}
