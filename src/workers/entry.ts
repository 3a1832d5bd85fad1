import { jobs } from './jobs.ts';
import type { ToWorker } from './messages.ts';
import { serveJobs } from './serve.ts';

// The one script of the page's workers; built as a classic script, so that it runs from a file, too.
serveJobs(
  {
    post: (message) => self.postMessage(message),
    listen: (take) => {
      self.onmessage = (event: MessageEvent<ToWorker>) => take(event.data);
    },
  },
  jobs,
);
