/**
 * A small experiment of our own, one row a person: load (points) under two signals. Person p13 took the headset off.
 * Voice minus tone for p01 to p12, in order of size: -14 -12 -10 -9 -8 -8 -7 -6 -5 -3 2 30. Without the last, which a
 * cutoff of 3 MAD sets aside, two are trimmed at each end and (-10 - 9 - 8 - 8 - 7 - 6 - 5) / 7 = -53 / 7 remains.
 */
const people: readonly (readonly [name: string, shift: string, tone: number, voice: number])[] = [
  ['p01', 'day', 60, 46],
  ['p02', 'night', 61, 49],
  ['p03', 'day', 62, 52],
  ['p04', 'night', 63, 54],
  ['p05', 'day', 64, 56],
  ['p06', 'night', 65, 57],
  ['p07', 'day', 60, 53],
  ['p08', 'night', 61, 55],
  ['p09', 'day', 62, 57],
  ['p10', 'night', 63, 60],
  ['p11', 'day', 64, 66],
  ['p12', 'night', 65, 95],
  ['p13', 'day', 66, 61],
];

/** Its rows as a file, with that character between the values. */
export function ownRows(between = ','): string {
  const names = ['person', 'shift', 'load_tone', 'load_voice'];
  return [names, ...people].map((row) => `${row.join(between)}\n`).join('');
}

/** The trimmed mean of differences after both rules, as the page writes it. */
export const ownEstimate = /voice minus tone, 20 % trimmed mean of differences: \u22127\.6 points, 95 % interval \[/;
