/**
 * Refuses NaN.
 * @param name name of the argument, for the message
 * @param value any number, infinities included
 * @throws RangeError if value is NaN
 */
export function requireNumber(name: string, value: number): void {
  if (Number.isNaN(value)) throw new RangeError(`*${name}* must be a number; got NaN`);
}

/**
 * Refuses everything that is not a finite number.
 * @param name name of the argument, for the message
 * @param value any number
 * @throws RangeError if value is NaN or infinite
 */
export function requireFinite(name: string, value: number): void {
  if (!Number.isFinite(value)) throw new RangeError(`*${name}* must be finite; got ${value}`);
}

/**
 * Refuses everything that is not a positive number; Infinity passes.
 * @param name name of the argument, for the message
 * @param value a shape or degrees of freedom
 * @throws RangeError unless value > 0
 */
export function requirePositive(name: string, value: number): void {
  if (!(value > 0)) throw new RangeError(`*${name}* must be above 0; got ${value}`);
}

/**
 * Refuses everything outside 0..1.
 * @param name name of the argument, for the message
 * @param value a probability
 * @throws RangeError unless 0 <= value <= 1
 */
export function requireProbability(name: string, value: number): void {
  if (!(value >= 0 && value <= 1)) throw new RangeError(`*${name}* must be between 0 and 1; got ${value}`);
}

/**
 * Refuses everything that is not a whole number in a range.
 * @param name name of the argument, for the message
 * @param value a count
 * @param least smallest count allowed
 * @param most largest count allowed; Number.MAX_SAFE_INTEGER unless given
 * @throws RangeError unless value is a whole number in least..most
 */
export function requireInteger(name: string, value: number, least: number, most = Number.MAX_SAFE_INTEGER): void {
  if (Number.isInteger(value) && value >= least && value <= most) return;
  const upTo = most === Number.MAX_SAFE_INTEGER ? '' : ` and at most ${most}`;
  throw new RangeError(`*${name}* must be a whole number of at least ${least}${upTo}; got ${value}`);
}
