import { type Design, participantNoun } from '../../src/analysis/design.ts';
import type { Measure, Scope } from '../../src/analysis/rules.ts';
import type { Column, Table } from '../../src/data/table.ts';
import { choiceBlank, choicesBlank, columnOptions, numberBlank, numbersOnly, textBlank } from '../blanks.ts';
import type { Blank, Context, Num, Option, Part } from '../kind.ts';

export type ExclusionSettings = {
  /** What is set aside: participants by name, single trials (or scores), or whole participants. */
  readonly what: 'named' | 'trial' | 'participant';
  readonly how: 'below' | 'above' | 'beyond' | 'kept-share';
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

function beyondParts(settings: ExclusionSettings, context: Context, design: Design | undefined): Part[] {
  const cutoff = numberBlank(
    { key: 'cutoff', label: 'cutoff' },
    settings.cutoff,
    context,
    { min: 0.5, max: 10, step: 0.1, unit: '', none: 'any number of' },
    (value) => ({ ...settings, cutoff: value }),
  );
  const measure = choiceBlank(
    { key: 'measure', label: 'measure of distance' },
    settings.measure,
    [
      { value: 'MAD', label: 'MAD', hint: 'from the median; MAD times 1.4826' },
      { value: 'SD', label: 'SD', hint: 'from the mean; SD with divisor n \u2212 1' },
      { value: 'fences', label: 'IQR', hint: 'outside the quartiles (interpolated, type 7)' },
    ],
    'MAD',
    (value) => ({ ...settings, measure: value }),
  );
  const middle = settings.measure === 'SD' ? 'mean' : settings.measure === 'MAD' ? 'median' : 'quartiles';
  const blind = settings.scope === 'pooled' || settings.scope === 'participant';
  return [
    cutoff,
    ' ',
    measure,
    ` from the ${middle} of `,
    scopeBlank(settings, design),
    ...(blind ? [`, ${whateverWords(design)}`] : []),
  ];
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
  return what === 'trial' && how === 'kept-share' ? 'beyond' : how;
}

function scopeFor(what: string, scope: Scope): Scope {
  if (what !== 'participant') return scope;
  return scope === 'condition' || scope === 'participant-condition' ? 'condition' : 'pooled';
}

function howBlank(settings: ExclusionSettings): Blank {
  const beyond =
    settings.sides === 'both'
      ? 'further than'
      : settings.sides === 'above'
        ? 'further above than'
        : 'further below than';
  const options: Option[] = [
    { value: 'below', label: 'below', hint: 'a fixed limit' },
    { value: 'above', label: 'above', hint: 'a fixed limit' },
    { value: 'beyond both', label: 'further than', hint: 'on either side' },
    { value: 'beyond above', label: 'further above than', hint: 'on the high side only' },
    { value: 'beyond below', label: 'further below than', hint: 'on the low side only' },
  ];
  if (settings.what === 'participant') {
    options.push({ value: 'kept-share', label: 'fewer than', hint: 'share of kept trials' });
  }
  const value = settings.how === 'beyond' ? `beyond ${settings.sides}` : settings.how;
  const blank = choiceBlank({ key: 'how', label: 'how a score is judged' }, value, options, beyond, (next) => {
    const [how, sides] = next.split(' ') as [ExclusionSettings['how'], ExclusionSettings['sides'] | undefined];
    return { ...settings, how, sides: sides ?? settings.sides };
  });
  return blank;
}

function namesBlank(settings: ExclusionSettings, design: Design | undefined): Blank {
  return choicesBlank(
    { key: 'participants', label: 'participants by name' },
    settings.participants,
    (design?.participants ?? []).map((name) => ({ value: name, label: name })),
    { prompt: 'which', atLeast: 1 },
    (participants) => ({ ...settings, participants }),
  );
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
  const fits = (column: Column) =>
    numbersOnly(column) ?? (column.name === roles?.participant ? 'tells participants apart' : null);
  return choiceBlank(
    { key: 'column', label: 'column judged' },
    settings.column || roles?.outcome || null,
    columnOptions(table, fits),
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

function scopeBlank(settings: ExclusionSettings, design: Design | undefined): Blank {
  const noun = design ? participantNoun(design.roles) : 'participant';
  const factors = design?.factors.map((factor) => factor.name).join(' and ') || 'condition';
  const options: Option[] =
    settings.what === 'participant'
      ? [
          { value: 'pooled', label: `all ${noun}s`, hint: 'pooled over groups' },
          { value: 'condition', label: 'the same group', hint: 'reads the condition: p and interval are withheld' },
        ]
      : [
          { value: 'participant', label: `the same ${noun}`, hint: `pooled over ${factors}` },
          { value: 'pooled', label: 'all scores', hint: 'pooled over everything' },
          {
            value: 'condition',
            label: `the same ${factors}`,
            hint: 'reads the condition: p and interval are withheld',
          },
          { value: 'participant-condition', label: `the same ${noun} and ${factors}`, hint: 'reads the condition' },
        ];
  return choiceBlank(
    { key: 'scope', label: 'scores the distance is measured among' },
    settings.scope,
    options,
    'all scores',
    (scope) => ({
      ...settings,
      scope,
    }),
  );
}

/** "whatever the alert": said of every rule that does not read the condition. */
function whateverWords(design: Design | undefined): string {
  const factors = design?.factors.map((factor) => factor.name) ?? [];
  return `whatever the ${factors.length === 0 ? 'condition' : factors.join(' and ')}`;
}
