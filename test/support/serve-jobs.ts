import { jobs } from '../../src/workers/jobs.ts';
import { serveInThread } from '../../src/workers/node-pool.ts';

// Run as a worker thread by tests of the program's own jobs.
serveInThread(jobs);
