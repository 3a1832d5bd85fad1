import { type Design, participantNoun } from '../../src/analysis/design.ts';
import { sortedLevels } from '../../src/analysis/hidden-design.ts';
import type { Measure, Scope } from '../../src/analysis/rules.ts';
import type { Column, Table } from '../../src/data/table.ts';
import { choiceBlank, choicesBlank, columnOptions, numberBlank, numbersOnly, textBlank } from '../blanks.ts';
import type { Blank, Context, Num, Option, Part } from '../kind.ts';
import { beyondParts, tellsApart, togetherParts, whateverWords } from './distances.ts';

export type ExclusionSettings = {
  /** What is set aside: participants by name, single trials (or scores), or whole participants. */
  readonly what: 'named' | 'trial' | 'participant';
  readonly how: 'below' | 'above' | 'beyond' | 'kept-share' | 'together';
  readonly participants: readonly string[];
  /** Why: for named participants and fixed limits. */
  readonly reason: string;
  /** Column judged; empty = the outcome. */
  readonly column: string;
  readonly limit: Num;
  readonly measure: Measure;
  readonly cutoff: Num;
  readonly sides: 'both' | 'above' | 'below';
  readonly scope: Scope;
  /** Least share of kept trials, percent. */
  readonly least: Num;
  /** Whether the rule looks again at who is left; absent in older files: it does not. */
  readonly repeated?: boolean;
  /** Columns judged together by MCD distance. */
  readonly columns?: readonly string[];
  /** Percent of normal participants within the limit on MCD distances. */
  readonly within?: Num;
};

/** One sentence a form: "Set aside [officer 23] because ..." / "Set aside a [trial] when its [ack_ms] is ..." */
export function exclusionSentence(settings: ExclusionSettings, context: Context): Part[] {
  const design = context.given.design as Design | undefined;
  const what = whatBlank(settings, design);
  if (settings.what === 'named') {
    return ['Set aside ', what, ' ', namesBlank(settings, design), ' because ', reasonBlank(settings), '.'];
  }
  if (settings.what === 'participant' && settings.how === 'kept-share') {
    return ['Set aside ', what, ' with ', howBlank(settings), ' ', leastBlank(settings, context), ' kept trials.'];
  }
  if (settings.what === 'participant' && settings.how === 'together') {
    return ['Set aside ', what, ...togetherParts(settings, howBlank(settings), context, design), '.'];
  }
  const head: Part[] = [
    'Set aside ',
    what,
    settings.what === 'participant' ? ' whose mean ' : ' when its ',
    columnBlank(settings, design),
    ' is ',
    howBlank(settings),
    ' ',
  ];
  if (settings.how !== 'beyond') {
    const whatever = settings.what === 'trial' ? `, ${whateverWords(design)}` : '';
    return [...head, limitBlank(settings, context, design), whatever, ', because ', reasonBlank(settings), '.'];
  }
  return [...head, ...beyondParts(settings, context, design), '.'];
}

function whatBlank(settings: ExclusionSettings, design: Design | undefined): Blank {
  const noun = design ? participantNoun(design.roles) : 'participant';
  const trial = design?.roles.rows === 'one score' ? 'a score' : 'a trial';
  const article = /^[aeiou]/.test(noun) ? 'an' : 'a';
  return choiceBlank(
    { key: 'what', label: 'what is set aside' },
    settings.what,
    [
      { value: 'named', label: noun, hint: `by name, with a reason (a documented fault)` },
      { value: 'trial', label: trial, hint: 'by a limit or a cutoff' },
      { value: 'participant', label: `${article} ${noun}`, hint: 'by a limit, a cutoff or the share of kept trials' },
    ],
    trial,
    (value) => ({ ...settings, what: value, how: howFor(value, settings.how), scope: scopeFor(value, settings.scope) }),
  );
}

function howFor(what: string, how: ExclusionSettings['how']): ExclusionSettings['how'] {
  return what === 'trial' && (how === 'kept-share' || how === 'together') ? 'beyond' : how;
}

function scopeFor(what: string, scope: Scope): Scope {
  if (what !== 'participant') return scope;
  return scope === 'condition' || scope === 'participant-condition' ? 'condition' : 'pooled';
}

function howBlank(settings: ExclusionSettings): Blank {
  const options: Option[] = [
    { value: 'below', label: 'below', hint: 'a fixed limit' },
    { value: 'above', label: 'above', hint: 'a fixed limit' },
    { value: 'beyond both', label: 'further than', hint: 'on either side' },
    { value: 'beyond above', label: 'further above than', hint: 'on the high side only' },
    { value: 'beyond below', label: 'further below than', hint: 'on the low side only' },
    {
      value: 'beyond both again',
      label: 'again and again further than',
      hint: 'on either side, repeated until nobody more is; see the caution',
    },
  ];
  if (settings.what === 'participant') {
    options.push(
      { value: 'kept-share', label: 'fewer than', hint: 'share of kept trials' },
      { value: 'together', label: 'further out than', hint: 'on several columns at once, by MCD distance' },
    );
  }
  const { how, sides, repeated = false } = settings;
  const value = how === 'beyond' ? `beyond ${sides}${repeated ? ' again' : ''}` : how;
  return choiceBlank({ key: 'how', label: 'how a score is judged' }, value, options, 'further than', (next) => {
    const [nextHow, nextSides, again] = next.split(' ') as [
      ExclusionSettings['how'],
      ExclusionSettings['sides'] | undefined,
      string | undefined,
    ];
    const { repeated: _, ...rest } = settings;
    return { ...rest, how: nextHow, sides: nextSides ?? sides, ...(again === 'again' ? { repeated: true } : {}) };
  });
}

function namesBlank(settings: ExclusionSettings, design: Design | undefined): Blank {
  return choicesBlank(
    { key: 'participants', label: 'participants by name' },
    settings.participants,
    namesOffered(design).map((name) => ({ value: name, label: name })),
    { prompt: 'which', atLeast: 1 },
    (participants) => ({ ...settings, participants }),
  );
}

/** While the conditions are hidden the order of the file is not shown: it may follow the groups. */
function namesOffered(design: Design | undefined): readonly string[] {
  const names = design?.participants ?? [];
  return design?.hidden ? sortedLevels(names) : names;
}

function reasonBlank(settings: ExclusionSettings): Blank {
  return textBlank({ key: 'reason', label: 'reason' }, settings.reason, 'for what reason', (reason) => ({
    ...settings,
    reason,
  }));
}

function columnBlank(settings: ExclusionSettings, design: Design | undefined): Blank {
  const table: Table | undefined = design?.table;
  const roles = design?.roles;
  const fits = (column: Column) => numbersOnly(column) ?? tellsApart(column, design);
  return choiceBlank(
    { key: 'column', label: 'column judged' },
    settings.column || roles?.outcome || null,
    columnOptions(table, fits, design?.hidden !== undefined),
    'which column',
    (column) => ({ ...settings, column: column === roles?.outcome ? '' : column }),
  );
}

function limitBlank(settings: ExclusionSettings, context: Context, design: Design | undefined): Blank {
  const unit = settings.column === '' ? (design?.roles.unit ?? '') : '';
  return numberBlank(
    { key: 'limit', label: 'limit' },
    settings.limit,
    context,
    { min: -1e9, max: 1e9, step: 1, unit },
    (limit) => ({ ...settings, limit }),
  );
}

function leastBlank(settings: ExclusionSettings, context: Context): Blank {
  return numberBlank(
    { key: 'least', label: 'least share of kept trials' },
    settings.least,
    context,
    { min: 0, max: 100, step: 5, unit: '%' },
    (least) => ({ ...settings, least }),
  );
}
