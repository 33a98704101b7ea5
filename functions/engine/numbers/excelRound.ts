import { EngineError } from '../EngineError';
import { roundToPlace } from './decimal';
import type { RoundingRule } from './decimal';

/**
 * What the worksheet's own ROUND ('half'), ROUNDUP ('up') and ROUNDDOWN ('down') return: decimal, on the 15 digits shown, ties away
 * from zero, 'up' away from zero, 'down' towards it. A fractional number of digits is truncated, as the worksheet does.
 *
 * @param digits   Decimal places; negative rounds left of the decimal point.
 * @throws         EngineError "domain" if an argument is not finite, "notFinite" if rounding up leaves the range of numbers.
 * @source         Microsoft's function reference, ROUND, ROUNDUP, ROUNDDOWN; ties and digits observed.
 * @example        excelRound(1.005, 2, 'half') // 1.01
 */
export function excelRound(x: number, digits: number, way: 'half' | 'up' | 'down'): number {
  if (!Number.isFinite(digits)) throw new EngineError('domain', `excelRound needs a finite number of digits, got ${digits}`);
  return roundToPlace(x, -Math.trunc(digits), ruleOf[way]);
}

const ruleOf: Record<'half' | 'up' | 'down', RoundingRule> = { half: 'halfUp', up: 'ceiling', down: 'floor' };
