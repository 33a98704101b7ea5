import { EngineError } from '../EngineError';
import { formatShape, type Shape } from '../evidence/shape';
import { type Tags } from './tags';

/** What the uncertainty of one input is derived from. */
export interface Evidence {
  /** Standard uncertainty, > 0, in the unit of the input. */
  readonly u: number;
  /** Degrees of freedom, > 0; Infinity if exactly known. */
  readonly dof: number;
  readonly shape: Shape;
  readonly tags: Tags;
  /** Name that joins rows into one evaluation; empty for none. */
  readonly group: string;
  /** What tells evidence rows apart: inputs with the same key are served by one row. */
  readonly row: string;
}

/** One independent, unit-variance cause of doubt. */
export interface Source {
  readonly id: number;
  /** The tag that makes inputs share it, as it was first written; empty if it is one input's own. */
  readonly tag: string;
  readonly dof: number;
  readonly shape: Shape;
  /** Evidence row of the first input it came with. */
  readonly row: string;
}

/** How much of a source is in an input: its estimate moves by `u` where the source moves by one standard deviation. */
export interface Share {
  readonly source: number;
  readonly u: number;
}

/**
 * The sources of one call. Each input brings its shares of tagged sources and the rest as a source of its own. Sources whose u
 * come from one evaluation (one evidence row, one group, rows joined by a tag) are one term of Welch–Satterthwaite.
 */
export class SourceTable {
  readonly sources: Source[] = [];
  private readonly tagged = new Map<string, number>();
  private readonly evaluationOfRow = new Map<string, number>();
  private readonly evaluationOfSource: number[] = [];
  private readonly joined: number[] = [];

  /**
   * Adds the doubt of one input.
   *
   * @returns its shares; their squares sum to u².
   * @throws EngineError "domain" if a tag is used with other degrees of freedom or another shape than before.
   */
  add(evidence: Evidence): Share[] {
    const evaluation = this.evaluation(evidence);
    if (evidence.tags.k !== 'shared') return [{ source: this.create('', evidence, evaluation), u: evidence.u }];
    const shares: Share[] = [];
    let rest = 1;
    for (const { tag, weight } of evidence.tags.weights) {
      shares.push({ source: this.taggedSource(tag, evidence, evaluation), u: weight * evidence.u });
      rest -= weight ** 2;
    }
    if (rest > 1e-9) shares.push({ source: this.create('', evidence, evaluation), u: Math.sqrt(rest) * evidence.u });
    return shares;
  }

  /** The evaluation that a source belongs to. */
  evaluationOf(source: number): number {
    return this.root(this.evaluationOfSource[source]);
  }

  private taggedSource(tag: string, evidence: Evidence, evaluation: number): number {
    const known = this.tagged.get(tag.toLowerCase());
    if (known === undefined) {
      const id = this.create(tag, evidence, evaluation);
      this.tagged.set(tag.toLowerCase(), id);
      return id;
    }
    const source = this.sources[known];
    if (source.dof !== evidence.dof) {
      throw new EngineError('domain', `tag "${tag}" is used with ${dofText(source.dof)} and with ${dofText(evidence.dof)} degrees of freedom`);
    }
    if (formatShape(source.shape) !== formatShape(evidence.shape)) {
      throw new EngineError('domain', `tag "${tag}" is used with the shapes ${formatShape(source.shape)} and ${formatShape(evidence.shape)}`);
    }
    this.join(this.evaluationOfSource[known], evaluation);
    return known;
  }

  private create(tag: string, { dof, shape, row }: Evidence, evaluation: number): number {
    const id = this.sources.length;
    this.sources.push({ id, tag, dof, shape, row });
    this.evaluationOfSource.push(evaluation);
    return id;
  }

  private evaluation({ row, group }: Evidence): number {
    const byRow = this.evaluationNamed(`row ${row}`);
    if (group.trim() !== '') this.join(byRow, this.evaluationNamed(`group ${group.trim().toLowerCase()}`));
    return byRow;
  }

  private evaluationNamed(key: string): number {
    let id = this.evaluationOfRow.get(key);
    if (id === undefined) {
      id = this.joined.length;
      this.joined.push(id);
      this.evaluationOfRow.set(key, id);
    }
    return id;
  }

  private join(a: number, b: number): void {
    this.joined[this.root(b)] = this.root(a);
  }

  private root(evaluation: number): number {
    let r = evaluation;
    while (this.joined[r] !== r) r = this.joined[r];
    this.joined[evaluation] = r;
    return r;
  }
}

const dofText = (dof: number): string => (dof === Infinity ? 'infinite' : String(dof));
