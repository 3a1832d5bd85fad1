import { describe, expect, it } from 'vitest';
import { guarded, settingsFit } from '../../cells/guard.ts';
import { type Kind, plainSentence, type Settings } from '../../cells/kind.ts';
import { registry } from '../../cells/registry.ts';
import { contextOf, run } from '../support/kind-run.ts';

const own = { what: 'trial', names: [], limit: null, alpha: 0.05, cutoff: 2, on: true } as const;
const context = contextOf();

/** Says what it was given, so that one sees which settings arrive. */
const telling = {
  ...(registry.note as Kind),
  name: 'telling',
  title: (settings: Settings) => `title ${JSON.stringify(settings)}`,
  defaults: () => own,
  check: (settings: Settings) => [`checked ${JSON.stringify(settings)}`],
  sentence: (settings: Settings) => [JSON.stringify(settings)],
  compute: (settings: Settings) => ({ value: null, detail: settings }),
} satisfies Kind;

describe('settings that a kind can read', () => {
  it('by hand: numbers may be shared or none, lists hold texts, unknown parts are let be', () => {
    expect(
      settingsFit(own, { ...own, limit: { shared: 'trim' }, cutoff: { shared: 'a' }, names: ['p1'], more: {} }),
    ).toBe(true);
    expect(settingsFit(own, { limit: 3 })).toBe(true);
    for (const wrong of [
      { what: 3 },
      { names: 'p1' },
      { names: [{}] },
      { names: ['p1', 3] },
      { alpha: 'x' },
      { alpha: null },
      { alpha: { shared: 'a' } },
      { cutoff: 'x' },
      { limit: {} },
      { on: 1 },
      { what: null },
    ]) {
      expect(settingsFit(own, { ...own, ...wrong })).toBe(false);
    }
  });

  it('by hand: whole settings pass as they are, a missing part is the kind\u2019s own, a wrong one is said', async () => {
    const kind = guarded(telling);
    expect(plainSentence(kind.sentence(own, context))).toBe(JSON.stringify(own));
    expect(plainSentence(kind.sentence({ alpha: 0.01 }, context))).toBe(JSON.stringify({ ...own, alpha: 0.01 }));
    expect((await run(kind, { alpha: 0.01 })).detail).toEqual({ ...own, alpha: 0.01 });
    expect(kind.title({ what: 3 })).toBe('telling');
    expect(kind.sentence({ what: 3 }, context)).toEqual(['Settings that cannot be read.']);
    expect(kind.check({ what: 3 }, context)).toEqual([
      'The settings of this telling cell cannot be read: a part of them is of another type. Remove the cell, or correct the file.',
    ]);
  });
});

describe('every kind of the registry', () => {
  const nonsense: Settings = Object.fromEntries(
    ['data', 'columns', 'participants', 'within', 'text', 'first', 'trim', 'statistic', 'make', 'to', 'what'].map(
      (key) => [key, { a: [7] }],
    ),
  );

  it.each(Object.entries(registry))('refuses nonsense in words, without an exception: %s', (name, kind) => {
    for (const settings of [{}, nonsense, kind.defaults(context)]) {
      expect(typeof kind.title(settings)).toBe('string');
      expect(plainSentence(kind.sentence(settings, context)).length).toBeGreaterThan(name === 'standing' ? -1 : 3);
      expect(kind.check(settings, context).every((each) => each.length > 10)).toBe(true);
    }
    const wrong = Object.keys(kind.defaults(context)).some((key) => key in nonsense);
    expect(kind.check(nonsense, context).some((each) => each.includes('cannot be read'))).toBe(wrong);
  });
});
