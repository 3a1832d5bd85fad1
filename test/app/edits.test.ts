import { describe, expect, it } from 'vitest';
import type { Context } from '../../cells/kind.ts';
import * as edits from '../../src/app/edits.ts';
import { offersAt, sharedIn } from '../../src/app/wiring.ts';
import type { Worksheet } from '../../src/worksheet/format.ts';
import { plainWorksheet, plainRegistry as registry, trim, wiring } from '../support/plain-registry.ts';

// every expectation follows from the rules of the page: nearest fitting cell above; what hands on goes into the flow
const chain = plainWorksheet(
  'c1 data',
  'c2 design table=c1',
  'c3 score design=c2',
  'c4 comparison scores=c3',
  'c5 claim result=c4',
  'c6 standing claim=c5',
);
const context = (): Context => ({ shared: [], given: {}, data: [] });

function add(worksheet: Worksheet, after: string | null, kind: string): edits.Added | null {
  return edits.addAfter(worksheet, registry, after, registry[kind]!, context);
}

describe('adding a cell', () => {
  it('by hand: a kind that gives what it takes goes into the flow, its readers now read it', () => {
    expect(wiring(add(chain, 'c2', 'exclusion')!.worksheet)).toEqual([
      'c1 data',
      'c2 design table=c1',
      'c7 exclusion design=c2',
      'c3 score design=c7',
      'c4 comparison scores=c3',
      'c5 claim result=c4',
      'c6 standing claim=c5',
    ]);
  });

  it('by hand: put at the end it reads the nearest fitting cell and takes no reader from above', () => {
    const added = add(chain, null, 'exclusion')!;
    expect(wiring(added.worksheet).slice(2)).toEqual([
      'c3 score design=c2',
      'c4 comparison scores=c3',
      'c5 claim result=c4',
      'c7 exclusion design=c2',
      'c6 standing claim=c5',
    ]);
    expect(added.id).toBe('c7');
  });

  it('by hand: a second comparison is nobody\u2019s source until it is chosen', () => {
    const { worksheet } = add(chain, 'c4', 'comparison')!;
    expect(wiring(worksheet)).toContain('c7 comparison scores=c3');
    expect(wiring(worksheet)).toContain('c5 claim result=c4');
  });

  it('by hand: the first claim brings the hidden standing cell, which stays last', () => {
    const bare = plainWorksheet('c1 data', 'c2 design table=c1', 'c3 score design=c2', 'c4 comparison scores=c3');
    const claimed = add(bare, null, 'claim')!.worksheet;
    expect(wiring(claimed).slice(4)).toEqual(['c5 claim result=c4', 'c6 standing claim=c5']);
    expect(add(claimed, null, 'note')!.worksheet.cells.at(-1)?.kind).toBe('standing');
  });

  it('by hand: the joint inference stands behind the strip and reads the claim and the strip\u2019s own cell', () => {
    const joint = {
      ...registry.standing!,
      name: 'joint',
      takes: { claim: 'claim', sweep: 'sweep' },
      gives: null,
    } as const;
    const sensitivity = { ...registry.standing!, name: 'sensitivity', offer: 'Repeat' };
    const both = { ...registry, joint, sensitivity };
    const put = (worksheet: Worksheet, kind: string) =>
      edits.addAfter(worksheet, both, null, (both as typeof registry)[kind]!, context)!.worksheet;
    const bare = plainWorksheet('c1 data', 'c2 design table=c1', 'c3 score design=c2', 'c4 comparison scores=c3');
    const claimed = put(bare, 'claim');
    const hidden = ['c6 standing claim=c5', 'c7 joint claim=c5 sweep=c6'];
    expect(wiring(claimed).slice(4)).toEqual(['c5 claim result=c4', ...hidden]);
    // another cell that gives a sweep does not take the strip's place
    expect(wiring(put(claimed, 'sensitivity')).slice(5)).toEqual(['c8 sensitivity claim=c5', ...hidden]);
    expect(edits.withStanding(claimed, both)).toBe(claimed);
    // a worksheet saved before there was a joint inference gets it with the next edit of its cells
    expect(wiring(edits.withStanding(chain, both)).slice(5)).toEqual(hidden);
    expect(wiring(edits.remove(claimed, both, 'c5')).slice(4)).toEqual(['c6 standing', 'c7 joint sweep=c6']);
  });

  it('by hand: cells below whose port found nothing read the new cell', () => {
    const broken = edits.remove(chain, registry, 'c3');
    expect(wiring(broken)).toContain('c4 comparison');
    expect(wiring(add(broken, 'c2', 'score')!.worksheet)).toContain('c4 comparison scores=c7');
  });

  it('refuses a kind that finds nothing to read', () => {
    expect(add(plainWorksheet('c1 data'), null, 'claim')).toBeNull();
    expect(offersAt(plainWorksheet('c1 data'), registry, 1).map((kind) => kind.name)).toEqual([
      'data',
      'derive',
      'design',
      'note',
    ]);
  });

  it('invariance: the record it started from is not touched', () => {
    const before = JSON.stringify(chain);
    add(chain, 'c2', 'exclusion');
    edits.remove(chain, registry, 'c2');
    edits.duplicate(chain, registry, 'c3');
    expect(JSON.stringify(chain)).toBe(before);
  });
});

describe('copying, leaving out and removing', () => {
  const ruled = add(chain, 'c2', 'exclusion')!.worksheet;

  it('by hand: the copy of a rule follows it in the flow', () => {
    expect(wiring(edits.duplicate(ruled, registry, 'c7')!.worksheet).slice(1, 5)).toEqual([
      'c2 design table=c1',
      'c7 exclusion design=c2',
      'c8 exclusion design=c7',
      'c3 score design=c8',
    ]);
  });

  it('by hand: the copy of a score reads what the score reads', () => {
    const copied = edits.duplicate(chain, registry, 'c3')!.worksheet;
    expect(wiring(copied)[3]).toBe('c7 score design=c2');
    expect(wiring(copied)[4]).toBe('c4 comparison scores=c3');
  });

  it('invariance: removing what was inserted gives the wiring back', () => {
    expect(wiring(edits.remove(ruled, registry, 'c7'))).toEqual(wiring(chain));
  });

  it('invariance: left out and put back is the same record', () => {
    const out = edits.leaveOut(chain, 'c3', true);
    expect(out.cells[2]?.leftOut).toBe(true);
    expect(edits.leaveOut(out, 'c3', false)).toEqual(chain);
  });

  it('by hand: without its claim the standing cell reads the next one, or nothing', () => {
    const two = add(chain, 'c5', 'claim')!.worksheet;
    expect(wiring(edits.remove(two, registry, 'c5')).at(-1)).toBe('c6 standing claim=c7');
    expect(wiring(edits.remove(chain, registry, 'c5')).at(-1)).toBe('c6 standing');
  });
});

describe('shared numbers', () => {
  it('by hand: a blank\u2019s number becomes shared and its users are found', () => {
    const shared = { ...trim, id: 'cutoff', name: 'cutoff', value: 2.5 };
    const made = edits.shareNumber(chain, 'c3', shared, { cutoff: { shared: 'cutoff' }, words: '' });
    expect(edits.usersOf(made, 'cutoff').map((cell) => cell.id)).toEqual(['c3']);
    expect(edits.dropShared(made, 'cutoff')).toBe(made);
    expect(edits.dropShared(made, 'trim').shared.map((each) => each.id)).toEqual(['cutoff']);
  });

  it('by hand: references are found anywhere in settings', () => {
    expect([...sharedIn({ a: [{ b: { shared: 'x' } }], c: { shared: 'y' }, d: 'shared' })]).toEqual(['x', 'y']);
  });

  it('by hand: ids are words of the name, never twice the same', () => {
    expect(edits.sharedId(chain, 'Fastest allowed!')).toBe('fastest-allowed');
    expect(edits.sharedId(chain, 'Trim')).toBe('trim-2');
    expect(edits.sharedId(chain, '\u00b5\u00b5')).toBe('number');
  });
});
