import { associationMethods } from './association.ts';
import type { CaseMethods } from './case-data.ts';
import { checkMethods } from './checks.ts';
import { outlierRuleMethods } from './outlier-rules.ts';

/** Methods of the sections "Association and regression", "Distribution checks", "Outlier rules", "Transformations". */
export const methods: CaseMethods = { ...associationMethods, ...checkMethods, ...outlierRuleMethods };
