import type { Design } from '../../src/analysis/design.ts';
import type { Context, Json } from '../kind.ts';
import type { ExclusionSettings } from './sentence.ts';

/** What an exclusion rule may not do while the conditions are hidden, as sentences. */
export function hiddenProblems(settings: ExclusionSettings, context: Context): string[] {
  const design = context.given.design as Design | undefined;
  if (design?.hidden === undefined || settings.what === 'named' || settings.how === 'kept-share') return [];
  const problems: string[] = [];
  const reads = settings.scope === 'condition' || settings.scope === 'participant-condition';
  if (settings.how === 'beyond' && reads) {
    problems.push(
      'This rule reads the condition, and the conditions are hidden: measure the distance among all scores or those of the same participant, or open the conditions first.',
    );
  }
  const columns = settings.how === 'together' ? (settings.columns ?? []) : [settings.column];
  const telling = columns.find((column) => isHidden(design, column));
  if (telling !== undefined) {
    problems.push(`Column ${telling} tells the condition, and is hidden with it: judge another column.`);
  }
  return problems;
}

function isHidden(design: Design, column: string): boolean {
  return design.factors.some((factor) => factor.name === column) || design.hidden?.columns.includes(column) === true;
}

/** What is saved of a rule while the conditions are hidden: counts, and no row or participant. */
export function hiddenRecord(design: Design): Json {
  const step = design.steps.at(-1);
  return {
    setAside: step?.rows.length ?? 0,
    participants: step?.participants.length ?? 0,
    kept: keptRows(design),
  };
}

/** Rows still in. */
export function keptRows(design: Design): number {
  let kept = 0;
  for (const mark of design.kept) kept += mark;
  return kept;
}
