import { each } from '../declaration';
import { EngineError } from '../engine/EngineError';
import { type Ware, wares } from '../engine/evidence/glasswareTables';
import { glasswareTolerance } from '../engine/evidence/glasswareTolerance';
import { choice, flag, number, parsed } from '../parameters';

export const glasswareFunctions = [
  each({
    name: 'GLASS_TOL',
    family: 'Evidence to standard uncertainty',
    help: 'Tolerance in mL of a flask, one-mark pipette, burette, cylinder or piston pipette by its standard. Most tables are from memory: check them against your standard or certificate.',
    parameters: {
      ware: parsed(readWare, { help: 'flask, pipette (one mark), burette, cylinder, piston (systematic error) or piston random (a standard deviation)' }),
      capacity: number({ help: 'Nominal capacity in mL', above: 0, leads: true }),
      class: choice({ help: 'A (default) or B; piston pipettes have none', choices: ['A', 'B'] }),
      standard: choice({ help: 'ISO (default) or ASTM', choices: ['ISO', 'ASTM'] }),
      division: number({ help: 'Scale division in mL, for burettes of which there are several', above: 0, optional: true }),
      full: flag('TRUE spills the tolerance, the standard with its edition, and how sure the figure is'),
    },
    result: 'half-width in mL; with full: half-width, standard, provenance',
    columns: ({ full }) => (full ? 3 : 1),
    body: (v) => {
      const found = glasswareTolerance(v.ware, v.capacity, v.class, v.standard, v.division);
      return v.full ? [found.tolerance, found.title, found.provenance] : found.tolerance;
    },
  }),
];

function readWare(text: string): Ware {
  const found = wares.find((ware) => ware === text.trim().toLowerCase());
  if (!found) throw new EngineError('choice', `ware must be one of ${wares.join(', ')}, got "${text}"`);
  return found;
}
