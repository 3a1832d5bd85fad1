import { describe, expect, it } from 'vitest';
import { noteKind } from '../../cells/note/kind.ts';
import { blankOf, contextOf, run } from '../support/kind-run.ts';

describe('the note cell', () => {
  it('by hand: an empty note asks to be written, another does not', () => {
    const parts = noteKind.sentence({ text: ' # Why\n\nBecause.' }, contextOf());
    expect(blankOf(parts, 'text')).toMatchObject({ filled: true });
    expect(blankOf(noteKind.sentence({ text: ' \n' }, contextOf()), 'text')).toMatchObject({
      shown: 'Write a note',
      filled: false,
    });
  });

  it('by hand: filling it gives the settings; it is long', () => {
    const { editor } = blankOf(noteKind.sentence({ text: '' }, contextOf()), 'text');
    expect(editor.type === 'text' && editor.set('new')).toEqual({ text: 'new' });
    expect(editor.type === 'text' && editor.long).toBe(true);
  });

  it('by hand: it reads and gives nothing, records nothing, and needs nothing', async () => {
    const computed = await run(noteKind, { text: 'a **b**' });
    expect(computed).toEqual({ value: null, detail: { text: 'a **b**' } });
    expect(noteKind.say(computed, { text: 'a **b**' })).toBe('a **b**');
    expect(noteKind.record(computed)).toBeNull();
    expect(noteKind.check({ text: '' }, contextOf())).toEqual([]);
    expect([noteKind.takes, noteKind.gives, noteKind.blind]).toEqual([{}, null, 'same']);
  });
});
