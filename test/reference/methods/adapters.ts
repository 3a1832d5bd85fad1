import { methods as associationChecksRules } from './association-checks-rules.ts';
import type { CaseMethods } from './case-data.ts';
import { methods as groups } from './groups.ts';
import { methods as twoConditions } from './two-conditions.ts';

/** Every method of the outside check cases that the numerics room offers. */
export const caseMethods: CaseMethods = { ...twoConditions, ...groups, ...associationChecksRules };
