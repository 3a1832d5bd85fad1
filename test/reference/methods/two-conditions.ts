import type { CaseMethods } from './case-data.ts';
import { methods as locationScale } from './location-scale.ts';
import { methods as oneSamplePaired } from './one-sample-paired.ts';
import { methods as twoGroups } from './two-groups.ts';

/** Methods for one sample, pairs and two independent groups. */
export const methods: CaseMethods = { ...locationScale, ...oneSamplePaired, ...twoGroups };
