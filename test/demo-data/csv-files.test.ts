import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { csvFiles } from '../../demo-data/csv-files.ts';

const rowsOf = (name: string): Record<string, string>[] => {
  const [header = '', ...lines] = readFileSync(`demo-data/${name}`, 'utf8').trimEnd().split('\n');
  const names = header.split(',');
  return lines.map((line) => Object.fromEntries(line.split(',').map((cell, i) => [names[i] ?? '', cell])));
};

describe('demo data files', () => {
  test.each(csvFiles)('invariance: $name is what its generator makes, byte for byte', ({ name, make }) => {
    expect(readFileSync(`demo-data/${name}`, 'utf8')).toBe(make());
  });

  // Counted here from the file; the numbers are those demo-data/README.md states.
  test('by hand: bridge-alerts.csv has 2,120 trials of 36 officers, 60 of them misread and 9 anticipations', () => {
    const rows = rowsOf('bridge-alerts.csv');
    expect(rows.length).toBe(2120);
    expect(new Set(rows.map((row) => row.officer)).size).toBe(36);
    expect(new Set(rows.map((row) => `${row.officer} ${row.alert}`)).size).toBe(106);
    expect(rows.filter((row) => row.officer === '23').length).toBe(60);
    const early = rows.filter((row) => Number(row.ack_ms) < 150);
    expect(early.length).toBe(9);
    expect(early.filter((row) => row.officer === '23')).toEqual([]);
    const perOfficer = [...new Set(early.map((row) => row.officer))].map(
      (officer) => early.filter((row) => row.officer === officer).length,
    );
    expect(Math.max(...perOfficer)).toBe(3);
    expect(rows.length - 60 - 9).toBe(2051);
  });

  test('by hand: 34 officers other than officer 23 met both voice and tone', () => {
    const rows = rowsOf('bridge-alerts.csv').filter((row) => row.officer !== '23');
    const met = (alert: string) => new Set(rows.filter((row) => row.alert === alert).map((row) => row.officer));
    const tone = met('tone');
    expect([...met('voice')].filter((officer) => tone.has(officer)).length).toBe(34);
  });

  test('by hand: the other files have the rows, groups and missing ratings their README states', () => {
    const wide = rowsOf('bridge-workload-wide.csv');
    expect(wide.length).toBe(36);
    expect(wide.flatMap((row) => Object.values(row)).filter((cell) => cell === '').length).toBe(2);
    const gloves = rowsOf('glove-peg-test.csv').map((row) => row.glove);
    expect([gloves.filter((each) => each === 'thin').length, gloves.length]).toEqual([14, 32]);
    expect(rowsOf('hearing-words.csv').length).toBe(25);
  });
});
