/** The table of jobs: pure functions by name, each given plain data that can be cloned to a worker. */
export const jobs = {};

export type Jobs = typeof jobs;
