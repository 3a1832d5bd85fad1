import type { CaseMethods } from './case-data.ts';

/** Methods for one sample, pairs and two independent groups. */
export const methods: CaseMethods = {};
