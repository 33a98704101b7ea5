import { toBool, toNumber } from '../coerce';
import { compare } from '../compare';
import { type Lazy, type Native, type ParameterKind, lazyFunction } from '../native';
import type { Run } from '../run';
import { type Bool, type Num, type Scalar, BLANK, FALSE, err, num } from '../scalar';
import { type Matrix, type Value, isScalar } from '../value';
import { follow } from './follow';

/**
 * IF, IFS, SWITCH, CHOOSE, IFERROR, IFNA. Only the argument that is chosen is evaluated, unless a condition is a matrix: then all
 * are, and each element chooses for itself. What is chosen keeps its slopes and is linked with slope 0 to what decided.
 */
export const choices: Native[] = [
  lazyFunction('IF', 2, 3, (run, args) => {
    const asked = elements(run, args[0].value());
    const branch = (i: number): Value => (i < args.length ? given(args[i]) : FALSE);
    if (asked.k === 'matrix') {
      return run.lift([asked, branch(1), branch(2)], kinds('boolean'), (_run, [c, yes, no]) =>
        run.steps.chosen((truth(c) ? yes : no) ?? ZERO, c!));
    }
    const c = toBool(run.steps, asked);
    return c.k === 'error' ? c : follow(run, branch(c.v ? 1 : 2), c);
  }),

  lazyFunction('IFS', 2, 254, (run, args) => {
    if (args.length % 2 === 1) return err('#N/A');
    const decided: Scalar[] = [];
    for (let i = 0; i < args.length; i += 2) {
      const asked = elements(run, args[i].value());
      if (asked.k === 'matrix') {
        const rest = args.slice(i + 1).map(given);
        return run.lift([asked, ...rest], (at) => (at % 2 === 0 ? 'boolean' : 'scalar'), (_run, row) => firstTrue(run, row, decided));
      }
      const c = toBool(run.steps, asked);
      if (c.k === 'error') return run.steps.chosen(c, ...decided);
      decided.push(c);
      if (c.v) return follow(run, args[i + 1].value(), ...decided);
    }
    return run.steps.error('#N/A', ...decided);
  }),

  lazyFunction('SWITCH', 3, 254, (run, args) => {
    const asked = elements(run, args[0].value());
    if (asked.k === 'matrix') {
      return run.lift([asked, ...args.slice(1).map(given)], kinds('scalar'), (_run, row) => firstEqual(run, row));
    }
    if (asked.k === 'error') return asked;
    const decided: Scalar[] = [asked];
    let i = 1;
    for (; i + 1 < args.length; i += 2) {
      const candidate = elements(run, args[i].value());
      if (candidate.k === 'matrix') {
        const rest = args.slice(i + 1).map(given);
        return run.lift([asked, candidate, ...rest], kinds('scalar'), (_run, row) => firstEqual(run, row));
      }
      if (candidate.k === 'error') return run.steps.chosen(candidate, ...decided);
      decided.push(candidate);
      if (compare(asked, candidate) === 0) return follow(run, args[i + 1].value(), ...decided);
    }
    return i < args.length ? follow(run, args[i].value(), ...decided) : run.steps.error('#N/A', ...decided);
  }),

  lazyFunction('CHOOSE', 2, 255, (run, args) => {
    const asked = elements(run, args[0].value());
    if (asked.k === 'matrix') {
      return run.lift([asked, ...args.slice(1).map(given)], kinds('number'), (_run, [n, ...rest]) => {
        const at = Math.trunc((n as Num).v);
        return at >= 1 && at <= rest.length ? run.steps.chosen(rest[at - 1] ?? ZERO, n!) : run.steps.error('#VALUE!', n!);
      });
    }
    const n = toNumber(run.steps, asked);
    if (n.k === 'error') return n;
    const at = Math.trunc(n.v);
    return at >= 1 && at < args.length ? follow(run, args[at].value(), n) : run.steps.error('#VALUE!', n);
  }),

  lazyFunction('IFERROR', 2, 2, (run, args) => instead(run, args, () => true)),
  lazyFunction('IFNA', 2, 2, (run, args) => instead(run, args, (code) => code === '#N/A')),
];

/** The value, or where it is an error of the kind caught the fallback, linked to where the error came from. */
function instead(run: Run, [value, fallback]: readonly Lazy[], caught: (code: string) => boolean): Value {
  const tried = elements(run, given(value));
  if (tried.k !== 'matrix') return tried.k === 'error' && caught(tried.v) ? follow(run, fallback.value(), tried) : tried;
  if (![...tried.cells, tried.fill].some((s) => s.k === 'error' && caught(s.v))) return tried;
  return run.lift([tried, given(fallback)], () => 'scalar', (_run, [s, other]) =>
    s!.k === 'error' && caught(s!.v) ? run.steps.chosen(other ?? ZERO, s!) : s!);
}

/** IFS for one element: conditions and values in turn, the first condition coerced already. */
function firstTrue(run: Run, row: readonly (Scalar | undefined)[], before: readonly Scalar[]): Scalar {
  const decided = [...before];
  for (let i = 0; i < row.length; i += 2) {
    const c = toBool(run.steps, row[i] ?? FALSE);
    if (c.k === 'error') return run.steps.chosen(c, ...decided);
    decided.push(c);
    if (c.v) return run.steps.chosen(row[i + 1] ?? ZERO, ...decided);
  }
  return run.steps.error('#N/A', ...decided);
}

/** SWITCH for one element: what is asked, then candidates and values in turn, then perhaps a default. */
function firstEqual(run: Run, [asked, ...row]: readonly (Scalar | undefined)[]): Scalar {
  if (asked!.k === 'error') return asked!;
  const decided: Scalar[] = [asked!];
  let i = 0;
  for (; i + 1 < row.length; i += 2) {
    const candidate = row[i] ?? ZERO;
    if (candidate.k === 'error') return run.steps.chosen(candidate, ...decided);
    decided.push(candidate);
    if (compare(asked!, candidate) === 0) return run.steps.chosen(row[i + 1] ?? ZERO, ...decided);
  }
  return i < row.length ? run.steps.chosen(row[i] ?? ZERO, ...decided) : run.steps.error('#N/A', ...decided);
}

/** A value as one scalar, or as a matrix where it has several elements and the sheet does not intersect. */
function elements(run: Run, value: Value): Scalar | Matrix {
  if (isScalar(value) || value.k === 'matrix') return value.k === 'matrix' && value.rows * value.cols === 1 ? run.scalar(value) : value;
  if (value.k === 'missing') return BLANK;
  const all = run.lift([value], () => 'scalar', (_run, [s]) => s ?? BLANK);
  return all.k === 'matrix' ? all : run.scalar(all);
}

/** An argument; 0 where nothing stands between the commas. */
const given = (arg: Lazy): Value => (arg.missing ? ZERO : arg.value());

const ZERO = num(0);

const truth = (c: Scalar | undefined): boolean => (c as Bool).v;

/** The kind of the first argument, all others as they are. */
const kinds = (first: ParameterKind) => (i: number): ParameterKind => (i === 0 ? first : 'scalar');
