import { associationKind } from './association/kind.ts';
import { assumptionsKind } from './assumptions/kind.ts';
import { claimKind } from './claim/kind.ts';
import { comparisonKind } from './comparison/kind.ts';
import { dataKind } from './data/kind.ts';
import { deriveKind } from './derive/kind.ts';
import { designKind } from './design/kind.ts';
import { errorRatesKind } from './error-rates/kind.ts';
import { exclusionKind } from './exclusion/kind.ts';
import { guardAll } from './guard.ts';
import { influenceKind } from './influence/kind.ts';
import { jointKind } from './joint/kind.ts';
import type { Registry } from './kind.ts';
import { noteKind } from './note/kind.ts';
import { reshapeKind } from './reshape/kind.ts';
import { scoreKind } from './score/kind.ts';
import { sensitivityKind } from './sensitivity/kind.ts';
import { standingKind } from './standing/kind.ts';

/** Every cell kind by its name in saved files, in the order of the "Then ..." list. */
export const registry = guardAll({
  data: dataKind,
  reshape: reshapeKind,
  derive: deriveKind,
  design: designKind,
  exclusion: exclusionKind,
  score: scoreKind,
  assumptions: assumptionsKind,
  comparison: comparisonKind,
  association: associationKind,
  claim: claimKind,
  sensitivity: sensitivityKind,
  influence: influenceKind,
  'error-rates': errorRatesKind,
  note: noteKind,
  standing: standingKind,
  joint: jointKind,
} as const satisfies Registry);

export type KindName = keyof typeof registry;
