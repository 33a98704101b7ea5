import { EngineError } from '../EngineError';
import { type GlassClass, type GlassStandard, type Ware, glasswareTables } from './glasswareTables';

/** A tolerance with where it comes from. */
export interface GlasswareTolerance {
  /** Half-width in mL. */
  readonly tolerance: number;
  readonly title: string;
  readonly provenance: string;
}

/**
 * The tolerance of volumetric glassware by a published table. Nothing is interpolated.
 *
 * @param capacity   Nominal capacity in mL.
 * @param division   Scale division in mL, where a table of burettes goes by it too.
 * @throws           EngineError "domain" for a capacity, or a division, that the table does not have; the message lists those it has.
 * @source           The standards named in the tables, most of them from memory: each result says so.
 * @example          glasswareTolerance('flask', 100, 'A', 'ISO').tolerance // 0.1
 */
export function glasswareTolerance(ware: Ware, capacity: number, glassClass: GlassClass, standard: GlassStandard, division?: number): GlasswareTolerance {
  const table = glasswareTables.find((t) => t.ware === ware && t.standard === standard);
  if (!table) throw new EngineError('choice', `glasswareTolerance needs a table for ${ware} by ${standard}, got none`);
  const name = table.classes === false ? table.title : `${table.title}, class ${glassClass}`;
  if (table.classes === false && glassClass === 'B') throw new EngineError('choice', `glasswareTolerance needs no class for a ${ware}: ${table.title} knows none, got B`);
  const rows = Object.entries(table[glassClass]).map(([size, tolerance]) => {
    const [, volume, step] = /^([\d.]+)(?:\(([\d.]+)\))?$/.exec(size)!;
    return { volume: Number(volume), step: step === undefined ? undefined : Number(step), tolerance };
  });
  const sized = rows.filter((row) => row.volume === capacity);
  if (sized.length === 0) {
    const known = [...new Set(rows.map((row) => row.volume))].sort((a, b) => a - b).join(', ');
    throw new EngineError('domain', `glasswareTolerance needs a capacity of ${name}: ${known} mL, got ${capacity}`);
  }
  const fitting = sized.filter((row) => division === undefined || row.step === undefined || row.step === division);
  if (fitting.length === 0 || (fitting.length > 1 && division === undefined)) {
    const known = sized.map((row) => row.step).join(', ');
    throw new EngineError('domain', `glasswareTolerance needs the division of a ${ware} of ${capacity} mL: ${known} mL, got ${division ?? 'none'}`);
  }
  return { tolerance: fitting[0].tolerance, title: name, provenance: table.provenance(glassClass, capacity) };
}
