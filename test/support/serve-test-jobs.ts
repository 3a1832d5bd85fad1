import { serveInThread } from '../../src/workers/node-pool.ts';
import { testJobs } from './jobs.ts';

// Run as a worker thread by the tests of the runners.
serveInThread(testJobs);
