import { describe, expect, it } from 'vitest';
import { permutationTwoGroups } from '../../src/numerics/permutation-two-groups.ts';
import { close, five, scores, six } from './samples.ts';

describe('all splits', () => {
  it('by hand: 3, 4 against 1, 2: one of six splits is as large, one as small', () => {
    const own = permutationTwoGroups(scores(3, 4), scores(1, 2));
    expect([own.estimate, own.splits]).toEqual([2, 6]);
    expect([
      close(own.pTwoSided, 1 / 3),
      close(own.pGreater, 1 / 6),
      close(own.pLess, 1),
      close(own.pDoubled, 1 / 3),
    ]).toEqual([true, true, true, true]);
  });
  it('agrees with SciPy 1.10 permutation_test over all 462 splits (rtol 1e-12)', () => {
    const own = permutationTwoGroups(six, five);
    expect(own.splits).toBe(462);
    expect(close(own.pDoubled, 0.24675324675324675, 1e-12) && close(own.pGreater, 0.12337662337662338, 1e-12)).toBe(
      true,
    );
  });
  it('theory: counting over whole units and enumerating agree', () => {
    const plain = permutationTwoGroups(six, five);
    const own = permutationTwoGroups(
      six.map((x) => x * Math.SQRT2),
      five.map((x) => x * Math.SQRT2),
    );
    expect(
      close(own.pTwoSided, plain.pTwoSided as number, 1e-12) && close(own.pLess, plain.pLess as number, 1e-12),
    ).toBe(true);
  });
  it('theory: by size and doubled differ when the sizes differ', () => {
    const own = permutationTwoGroups(scores(10), scores(1, 2, 9));
    expect(close(own.pTwoSided, 0.25, 1e-14) || close(own.pTwoSided, 0.5, 1e-14)).toBe(true);
    expect(close(own.pDoubled, 0.5, 1e-14)).toBe(true);
  });
  it('invariance: exchange of the groups, offset', () => {
    const own = permutationTwoGroups(six, five);
    const turned = permutationTwoGroups(
      five.map((x) => x + 10),
      six.map((x) => x + 10),
    );
    expect(
      close(turned.pLess, own.pGreater as number, 1e-12) && close(turned.pTwoSided, own.pTwoSided as number, 1e-12),
    ).toBe(true);
  });
  it('degenerate: all equal; too many splits of scores that are not decimals', () => {
    expect(permutationTwoGroups(scores(2, 2), scores(2)).pTwoSided).toBe(1);
    const many = Float64Array.from({ length: 20 }, (_, i) => Math.sqrt(i + 2));
    expect(
      permutationTwoGroups(
        many,
        many.map((x) => x + Math.PI),
      ),
    ).toMatchObject({ pTwoSided: null, reason: 'too many splits to try every one' });
  });
  it('refuses an empty group', () => {
    expect(() => permutationTwoGroups(scores(), five)).toThrow(RangeError);
  });
});
