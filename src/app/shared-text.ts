import { withUnit } from '../../cells/numbers.ts';
import type { SharedNumber } from '../worksheet/format.ts';

/** A shared number's value as it stands in the foot: "20 %", "none". */
export function sharedText(shared: SharedNumber): string {
  return shared.value === null ? 'none' : withUnit(shared.value, shared.unit);
}
