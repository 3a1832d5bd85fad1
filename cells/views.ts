import { nothing, type TemplateResult } from 'lit';
import { associationView } from './association/view.ts';
import { assumptionsView } from './assumptions/view.ts';
import { claimView } from './claim/view.ts';
import { comparisonView } from './comparison/view.ts';
import { ratesView } from './error-rates/view.ts';
import { exclusionView } from './exclusion/view.ts';
import { influenceView } from './influence/view.ts';
import type { Computed, ViewContext } from './kind.ts';
import { noteView } from './note/view.ts';
import type { KindName } from './registry.ts';
import { scoreView } from './score/view.ts';
import { sensitivityView } from './sensitivity/view.ts';
import { standingView } from './standing/view.ts';

/** Draws what a cell came to. */
export type View = (computed: Computed<never, never>, context: ViewContext) => TemplateResult | typeof nothing;

/** Kinds whose sentence, margin and tables say it all. */
const plain: View = () => nothing;

/** Kind -> view; a kind without one does not compile. */
export const views: Readonly<Record<KindName, View>> = {
  data: plain,
  reshape: plain,
  derive: plain,
  design: plain,
  exclusion: exclusionView,
  score: scoreView,
  assumptions: assumptionsView,
  comparison: comparisonView,
  association: associationView,
  claim: claimView,
  sensitivity: sensitivityView,
  influence: influenceView,
  'error-rates': ratesView,
  note: noteView,
  standing: standingView,
  joint: plain,
};
