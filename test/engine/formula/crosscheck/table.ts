import type { Numbers } from './job';
import type { Draws } from './seeded';

/** One smooth function as it is checked: a formula over a few cells, and arguments for it. */
export interface Row {
  /** The native function, or the operator, that the row is about. */
  readonly name: string;
  readonly formula: string;
  readonly draw: (from: Draws) => Numbers;
  /** Step of the differences over the argument, where 0.004 is not small against the distance to a pole or corner. */
  readonly step?: number;
}

type Limits = readonly [low: number, high: number];

const quadrants = ([[0.5, 5], [-5, -0.5]] as const).flatMap((x) => ([[0.5, 5], [-5, -0.5]] as const).map((y) => [x, y] as const));

/**
 * The functions whose slopes are derivatives, with arguments at which they have one: away from poles, corners, jumps and ties.
 * This table drives the comparison with other engines; a name that stands neither here nor in `notSmooth` fails a test.
 */
export const smoothTable: readonly Row[] = [
  binary('+'), binary('-'), binary('*'), binary('/'), binary('^'),
  row('-', '=1-A1%', { A1: [-5, 5] }), row('-', '=-A1-(-B1)', { A1: [1, 5], B1: [6, 9] }),
  row('^', '=A1^3', { A1: [-5, -0.5] }),

  unary('ABS', -5, -0.5), unary('ABS', 0.5, 5),
  unary('SQRT', 0.2, 50), unary('SQRTPI', 0.2, 50),
  unary('EXP', -5, 5), unary('LN', 0.2, 50), unary('LOG10', 0.2, 50), unary('LOG', 1.5, 50),
  row('LOG', '=LOG(A1,B1)', { A1: [1.5, 50], B1: [1.5, 20] }),
  row('LOG', '=LOG(A1,B1)', { A1: [0.1, 0.8], B1: [0.1, 0.8] }),
  row('LOG', '=LOG(A1,2)', { A1: [1.5, 50] }),
  unary('DEGREES', -5, 5), unary('RADIANS', -300, 300),
  row('POWER', '=POWER(A1,B1)', { A1: [0.2, 5], B1: [-3, 3] }),
  row('POWER', '=POWER(A1,-2)', { A1: [-5, -0.5] }),

  unary('SIN', -3, 3), unary('COS', -1.4, 1.4), unary('TAN', -1.3, 1.3),
  unary('SEC', -1.3, 1.3), unary('CSC', 0.3, 2.8), unary('CSC', -2.8, -0.3), unary('COT', 0.3, 1.4), unary('COT', -1.4, -0.3),
  unary('ASIN', -0.9, 0.9), unary('ACOS', -0.9, 0.9), unary('ATAN', -5, 5), unary('ACOT', 0.2, 5), unary('ACOT', -5, -0.2),
  ...quadrants.map(([x, y]) => row('ATAN2', '=ATAN2(A1,B1)', { A1: x, B1: y })),
  unary('SINH', -4, 4), unary('COSH', -4, 4), unary('TANH', -4, 4),
  unary('SECH', -4, 4), unary('CSCH', 0.3, 4), unary('CSCH', -4, -0.3), unary('COTH', 0.3, 4), unary('COTH', -4, -0.3),
  unary('ASINH', 0.3, 30), unary('ASINH', -30, -0.3), unary('ACOSH', 1.2, 30), unary('ATANH', -0.9, 0.9),
  unary('ACOTH', 1.2, 8), unary('ACOTH', -8, -1.2),

  // in steps, so slope 0 between them; MOD between its jumps
  row('INT', '=INT(A1)', { A1: [3.2, 3.8] }), row('INT', '=INT(A1)', { A1: [-3.8, -3.2] }),
  row('TRUNC', '=TRUNC(A1)', { A1: [3.2, 3.8] }), row('TRUNC', '=TRUNC(A1,1)', { A1: [-3.38, -3.32] }),
  row('SIGN', '=SIGN(A1)', { A1: [-5, -0.5] }),
  row('MOD', '=MOD(A1,B1)', { A1: [7.2, 7.8], B1: [2.1, 2.3] }), row('MOD', '=MOD(A1,B1)', { A1: [-7.8, -7.2], B1: [2.1, 2.3] }),

  ...['SUM', 'AVERAGE', 'SUMSQ', 'PRODUCT', 'VAR', 'VAR.S', 'VARP', 'VAR.P', 'STDEV', 'STDEV.S', 'STDEVP', 'STDEV.P', 'DEVSQ']
    .map((name) => row(name, `=${name}(A1:C2)`, block('ABC', 2, [1, 9]))),
  ...['VAR.S', 'STDEV.S', 'STDEV.P', 'DEVSQ']
    .map((name) => finer(2e-5, row(name, `=${name}(A1:F1)`, block('ABCDEF', 1, [1000, 1010])))),
  row('SUM', '=SUM(A1,B1:C1,A1)', block('ABC', 1, [1, 9])),
  row('AVERAGE', '=AVERAGE(A1,B1:C1,2)', block('ABC', 1, [1, 9])),
  row('PRODUCT', '=PRODUCT(A1:B1,A1)', block('AB', 1, [-9, -1])),
  row('SUMPRODUCT', '=SUMPRODUCT(A1:A3,B1:B3)', block('AB', 3, [1, 9])),
  row('SUMPRODUCT', '=SUMPRODUCT(A1:A3,B1:B3,C1:C3)', block('ABC', 3, [1, 9])),
  row('SUMPRODUCT', '=SUMPRODUCT(A1:A3*A1:A3-B1:B3)', block('AB', 3, [4, 9])),

  ranked('MIN', '=MIN(A1:E1)'), ranked('MAX', '=MAX(A1:E1)'), ranked('MEDIAN', '=MEDIAN(A1:E1)'),
  ranked('MEDIAN', '=MEDIAN(A1:D1)'), ranked('SMALL', '=SMALL(A1:E1,2)'), ranked('LARGE', '=LARGE(A1:E1,2)'),

  ...['SLOPE', 'INTERCEPT', 'RSQ', 'CORREL', 'PEARSON', 'STEYX'].map((name) => line(name, `=${name}(A1:A7,B1:B7)`)),
  ...['FORECAST', 'FORECAST.LINEAR'].map((name) =>
    row(name, `=${name}(D1,A1:A7,B1:B7)`, (from) => ({ ...linePoints(from), D1: from.between(2, 9) }))),

  row('LINEST', '=INDEX(LINEST(A1:A7),1,1)', (from) => only('A', linePoints(from))),
  ...[1, 2].map((j) => line('LINEST', `=INDEX(LINEST(A1:A7,B1:B7),1,${j})`)),
  ...places(5, 2).map(([i, j]) => line('LINEST', `=INDEX(LINEST(A1:A7,B1:B7,TRUE,TRUE),${i},${j})`)),
  ...places(5, 2).filter(([i, j]) => i > 2 || j < 2)
    .map(([i, j]) => line('LINEST', `=INDEX(LINEST(A1:A7,B1:B7,FALSE,TRUE),${i},${j})`)),
  ...[1, 2, 3].map((j) => line('LINEST', `=INDEX(LINEST(A1:A7,B1:B7^{1,2}),1,${j})`)),
  ...places(5, 3).filter(([i, j]) => i < 3 || j < 3)
    .map(([i, j]) => finer(5e-4, row('LINEST', `=INDEX(LINEST(A1:A7,B1:C7,TRUE,TRUE),${i},${j})`, planePoints))),
  ...[1, 2].flatMap((i) => [1, 2].map((j) => row('LINEST', `=INDEX(LINEST(A1:A7,B1:C7,FALSE,TRUE),${i},${j})`, planePoints))),
  ...[1, 2, 3].map((j) => row('LINEST', `=INDEX(LINEST(A1:F1,A2:F3),1,${j})`, acrossPoints)),

  row('TREND', '=INDEX(TREND(A1:A7,B1:B7,D1),1)', (from) => ({ ...linePoints(from), D1: from.between(2, 9) })),
  row('TREND', '=INDEX(TREND(A1:A7,B1:C7),3)', planePoints), line('TREND', '=INDEX(TREND(A1:A7,B1:B7,,FALSE()),2)'),
  row('GROWTH', '=INDEX(GROWTH(A1:A7,B1:B7,D1),1)', (from) => ({ ...linePoints(from), D1: from.between(2, 9) })),
  ...[1, 2].map((j) => line('LOGEST', `=INDEX(LOGEST(A1:A7,B1:B7),1,${j})`)),
  row('MMULT', '=SUMSQ(MMULT(A1:C2,D1:E3))', { ...block('ABC', 2, [1, 9]), ...block('DE', 3, [1, 9]) }),
  row('MMULT', '=SUM(MMULT(A1:C1,D1:D3))', { ...block('ABC', 1, [1, 9]), ...block('D', 3, [1, 9]) }),
  ...[1, 2, 3].map((n) => row('MDETERM', `=MDETERM(A1:${'ABC'[n - 1]}${n})`, (from) => dominant(from, n))),
  ...places(3, 3).map(([i, j]) => row('MINVERSE', `=INDEX(MINVERSE(A1:C3),${i},${j})`, (from) => dominant(from, 3))),
  ...['GEOMEAN', 'HARMEAN', 'SKEW', 'SKEW.P', 'KURT', 'AVERAGEA', 'VARA', 'VARPA', 'STDEVA', 'STDEVPA'].map((name) => row(name, `=${name}(A1:C2)`, block('ABC', 2, [1, 9]))),
  ranked('AVEDEV', '=AVEDEV(A1:D1)'), ranked('TRIMMEAN', '=TRIMMEAN(A1:E1,0.4)'), ranked('MAXA', '=MAXA(A1:E1)'), ranked('MINA', '=MINA(A1:E1)'),
  ...['PERCENTILE', 'PERCENTILE.INC', 'PERCENTILE.EXC'].map((name) => rankedWith(name, `=${name}(A1:E1,F1)`, [0.27, 0.31])),
  ...['QUARTILE', 'QUARTILE.INC', 'QUARTILE.EXC'].map((name) => ranked(name, `=${name}(A1:D1,1)`)),
  ...['COVAR', 'COVARIANCE.P', 'COVARIANCE.S', 'SUMX2MY2', 'SUMX2PY2', 'SUMXMY2'].map((name) => line(name, `=${name}(A1:A7,B1:B7)`)),
  row('STANDARDIZE', '=STANDARDIZE(A1,B1,C1)', { A1: [5, 9], B1: [1, 4], C1: [1, 3] }), unary('FISHER', -0.9, 0.9), unary('FISHERINV', -2, 2),
  row('PROB', '=PROB({1,2,3},A1:C1/SUM(A1:C1),1,2)', block('ABC', 1, [1, 3])),
  ...['CONFIDENCE', 'CONFIDENCE.NORM', 'CONFIDENCE.T'].map((name) => row(name, `=${name}(A1,B1,12)`, { A1: [0.02, 0.2], B1: [1, 3] })),

  ...['NORM.DIST', 'NORMDIST'].flatMap((name) => ['1', '0'].map((c) => row(name, `=${name}(A1,B1,C1,${c})`, { A1: [1, 5], B1: [2, 4], C1: [1, 2] }))),
  ...['NORM.INV', 'NORMINV'].map((name) => row(name, `=${name}(A1,B1,C1)`, { A1: [0.1, 0.9], B1: [2, 4], C1: [1, 2] })),
  ...['1', '0'].map((c) => row('NORM.S.DIST', `=NORM.S.DIST(A1,${c})`, { A1: [-2, 2] })),
  unary('NORMSDIST', -3, 3), unary('NORM.S.INV', 0.1, 0.9), unary('NORMSINV', 0.1, 0.9), unary('GAUSS', 0.2, 2), unary('PHI', -2, -0.5),
  ...['1', '0'].map((c) => row('LOGNORM.DIST', `=LOGNORM.DIST(A1,B1,C1,${c})`, { A1: [1, 5], B1: [0.5, 1.5], C1: [0.5, 2] })),
  row('LOGNORMDIST', '=LOGNORMDIST(A1,B1,C1)', { A1: [1, 5], B1: [0.5, 1.5], C1: [0.5, 2] }),
  ...['LOGNORM.INV', 'LOGINV'].map((name) => row(name, `=${name}(A1,B1,C1)`, { A1: [0.1, 0.9], B1: [0.5, 1.5], C1: [0.5, 1] })),
  ...['1', '0'].map((c) => row('T.DIST', `=T.DIST(A1,5,${c})`, { A1: [-3, 3] })),
  row('T.DIST.RT', '=T.DIST.RT(A1,5)', { A1: [-2, 4] }), row('T.DIST.2T', '=T.DIST.2T(A1,5)', { A1: [0.3, 4] }),
  row('TDIST', '=TDIST(A1,5,2)', { A1: [0.3, 4] }), row('T.INV', '=T.INV(A1,5)', { A1: [0.1, 0.4] }),
  ...['T.INV.2T', 'TINV'].map((name) => row(name, `=${name}(A1,5)`, { A1: [0.02, 0.5] })),
  ...['1', '0'].map((c) => row('CHISQ.DIST', `=CHISQ.DIST(A1,5,${c})`, { A1: [1, 9] })),
  ...['CHISQ.DIST.RT', 'CHIDIST'].map((name) => row(name, `=${name}(A1,5)`, { A1: [1, 20] })),
  row('CHISQ.INV', '=CHISQ.INV(A1,5)', { A1: [0.1, 0.9] }), ...['CHISQ.INV.RT', 'CHIINV'].map((name) => row(name, `=${name}(A1,5)`, { A1: [0.02, 0.9] })),
  ...['1', '0'].map((c) => row('F.DIST', `=F.DIST(A1,5,7,${c})`, { A1: [0.5, 4] })),
  ...['F.DIST.RT', 'FDIST'].map((name) => row(name, `=${name}(A1,5,7)`, { A1: [0.5, 4] })),
  row('F.INV', '=F.INV(A1,5,7)', { A1: [0.1, 0.9] }), ...['F.INV.RT', 'FINV'].map((name) => row(name, `=${name}(A1,5,7)`, { A1: [0.02, 0.9] })),
  ...['GAMMA.DIST', 'GAMMADIST'].flatMap((name) => ['1', '0'].map((c) => row(name, `=${name}(A1,2.5,B1,${c})`, { A1: [1, 9], B1: [1, 3] }))),
  ...['GAMMA.INV', 'GAMMAINV'].map((name) => row(name, `=${name}(A1,2.5,B1)`, { A1: [0.1, 0.9], B1: [1, 3] })),
  ...['1', '0'].map((c) => row('BETA.DIST', `=BETA.DIST(A1,2.5,3.5,${c},B1,C1)`, { A1: [1, 2], B1: [0, 0.5], C1: [3, 4] })),
  row('BETADIST', '=BETADIST(A1,2.5,3.5,B1,C1)', { A1: [1, 2], B1: [0, 0.5], C1: [3, 4] }),
  ...['BETA.INV', 'BETAINV'].map((name) => row(name, `=${name}(A1,2.5,3.5,B1,C1)`, { A1: [0.1, 0.9], B1: [0, 0.5], C1: [3, 4] })),
  ...['EXPON.DIST', 'EXPONDIST'].flatMap((name) => ['1', '0'].map((c) => row(name, `=${name}(A1,B1,${c})`, { A1: [0.5, 2], B1: [0.5, 2] }))),
  ...['WEIBULL.DIST', 'WEIBULL'].flatMap((name) => ['1', '0'].map((c) => row(name, `=${name}(A1,B1,C1,${c})`, { A1: [0.5, 2], B1: [1.2, 3], C1: [1, 3] }))),
  ...['POISSON.DIST', 'POISSON'].flatMap((name) => ['1', '0'].map((c) => row(name, `=${name}(3,A1,${c})`, { A1: [1, 9] }))),
  ...['BINOM.DIST', 'BINOMDIST'].flatMap((name) => ['1', '0'].map((c) => row(name, `=${name}(3,8,A1,${c})`, { A1: [0.1, 0.8] }))),
  ...['1', '0'].map((c) => row('NEGBINOM.DIST', `=NEGBINOM.DIST(3,5,A1,${c})`, { A1: [0.2, 0.8] })),
  row('NEGBINOMDIST', '=NEGBINOMDIST(3,5,A1)', { A1: [0.2, 0.8] }),

  unary('ERF.PRECISE', -2, 2), unary('ERFC.PRECISE', -2, 3), row('BINOM.DIST.RANGE', '=BINOM.DIST.RANGE(8,A1,2,5)', { A1: [0.1, 0.8] }),
  unary('ERF', -2, 2), row('ERF', '=ERF(A1,B1)', { A1: [-1, 0.2], B1: [0.5, 2] }), unary('ERFC', -2, 2),
  row('SERIESSUM', '=SERIESSUM(A1,B1,C1,D1:F1)', { A1: [0.5, 2], B1: [0.5, 2], C1: [0.5, 2], D1: [1, 3], E1: [1, 3], F1: [1, 3] }),
  row('CONVERT', '=CONVERT(A1,"ft","m")', { A1: [1, 9] }), row('CONVERT', '=CONVERT(A1,"F","C")', { A1: [40, 99] }),
  row('SEQUENCE', '=SUMSQ(SEQUENCE(3,2,A1,B1))', { A1: [1, 5], B1: [1, 2] }),
];

function row(name: string, formula: string, cells: Readonly<Record<string, Limits>> | Row['draw']): Row {
  if (typeof cells === 'function') return { name, formula, draw: cells };
  const draw = (from: Draws): Numbers =>
    Object.fromEntries(Object.entries(cells).map(([cell, [low, high]]) => [cell, from.between(low, high)]));
  return { name, formula, draw };
}

function finer(step: number, of: Row): Row {
  return { ...of, step };
}

function unary(name: string, low: number, high: number): Row {
  return row(name, `=${name}(A1)`, { A1: [low, high] });
}

function binary(operator: string): Row {
  return row(operator, `=A1${operator}B1`, { A1: [0.5, 5], B1: [-5, -0.5] });
}

/** The same limits for every cell of the columns named, from row 1 down. */
function block(columns: string, height: number, limits: Limits): Record<string, Limits> {
  return Object.fromEntries([...columns].flatMap((c) => Array.from({ length: height }, (_, i) => [`${c}${i + 1}`, limits])));
}

/** Five numbers at least 0.6 apart, in any order. */
function ranked(name: string, formula: string): Row {
  return row(name, formula, (from) => {
    const numbers = from.shuffled([1, 2, 3, 4, 5]).map((k) => k + from.between(-0.2, 0.2));
    return Object.fromEntries(numbers.slice(0, formula.includes('D1') ? 4 : 5).map((x, i) => [`${'ABCDE'[i]}1`, x]));
  });
}

/** The same with a fraction in F1. */
function rankedWith(name: string, formula: string, fraction: Limits): Row {
  const { draw } = ranked(name, formula);
  return row(name, formula, (from) => ({ ...draw(from), F1: from.between(...fraction) }));
}

function line(name: string, formula: string): Row {
  return row(name, formula, linePoints);
}

/** Seven points near a line: y in column A, x in column B, each x in a stretch of its own. */
function linePoints(from: Draws): Numbers {
  const cells: Record<string, number> = {};
  const slope = from.between(1, 3);
  const start = from.between(2, 4);
  for (let i = 1; i <= 7; i++) {
    cells[`B${i}`] = i + from.between(-0.3, 0.3);
    cells[`A${i}`] = start + slope * cells[`B${i}`] + from.between(-1, 1);
  }
  return cells;
}

/** The same with a second x in column C. */
function planePoints(from: Draws): Numbers {
  const cells: Record<string, number> = { ...linePoints(from) };
  const slope = from.between(1, 3);
  for (let i = 1; i <= 7; i++) {
    cells[`C${i}`] = 2 + ((i * 3) % 7) + from.between(-0.3, 0.3);
    cells[`A${i}`] += slope * cells[`C${i}`];
  }
  return cells;
}

/** Six points of a plane, lying: y in row 1, x in rows 2 and 3. */
function acrossPoints(from: Draws): Numbers {
  const plane = planePoints(from);
  return Object.fromEntries([...'ABCDEF'].flatMap((c, i) => [...'ABC'].map((of, r) => [`${c}${r + 1}`, plane[`${of}${i + 1}`]])));
}

/** A square block whose diagonal outweighs the rest, so that it stays far from singular; its rows in any order. */
function dominant(from: Draws, size: number): Numbers {
  const order = from.shuffled([1, 2, 3].slice(0, size));
  return Object.fromEntries(places(size, size).map(([i, j]) =>
    [`${'ABC'[j - 1]}${i}`, order[i - 1] === j ? from.between(6, 9) : from.between(-2.9, -0.3)]));
}

const only = (column: string, cells: Numbers): Numbers =>
  Object.fromEntries(Object.entries(cells).filter(([name]) => name.startsWith(column)));

/** All places of a block, row by row. */
function places(rows: number, cols: number): [number, number][] {
  return Array.from({ length: rows * cols }, (_, k) => [Math.floor(k / cols) + 1, (k % cols) + 1]);
}
