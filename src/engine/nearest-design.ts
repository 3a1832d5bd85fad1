import type { Context, Registry } from '../../cells/kind.ts';
import type { Worksheet } from '../worksheet/format.ts';

/**
 * The nearest design that the cells `ids` read, or are, and that is there: breadth first up the ports, so that a cell
 * that is veiled still finds the names of the conditions.
 */
export function nearestDesign(
  worksheet: Worksheet,
  registry: Registry,
  ids: readonly string[],
  valueFrom: (cellId: string) => unknown,
): Context['design'] {
  const seen = new Set<string>();
  for (let level = [...ids]; level.length > 0; ) {
    const next: string[] = [];
    for (const id of level) {
      const cell = worksheet.cells.find((each) => each.id === id);
      if (cell === undefined || seen.has(id)) continue;
      seen.add(id);
      const value = registry[cell.kind]?.gives === 'design' ? valueFrom(id) : undefined;
      if (value !== undefined) return value as Context['design'];
      next.push(...Object.values(cell.from));
    }
    level = next;
  }
  return undefined;
}
