import { fileURLToPath } from 'node:url';
import { build, type Rolldown } from 'vite';

/**
 * Bundles a module as the text of one classic script.
 *
 * @param url of the module, `new URL('./x.ts', import.meta.url)`
 * @param platform Node built-in modules stay imports in a 'node' script (format cjs)
 */
export async function bundleWorker(url: URL, platform: 'node' | 'browser'): Promise<string> {
  const built = (await build({
    configFile: false,
    logLevel: 'error',
    build: {
      write: false,
      minify: false,
      target: 'es2022',
      ...(platform === 'node' ? { ssr: fileURLToPath(url) } : {}),
      rolldownOptions: {
        input: fileURLToPath(url),
        output: { format: platform === 'node' ? 'cjs' : 'iife', codeSplitting: false },
      },
    },
  })) as Rolldown.RolldownOutput | Rolldown.RolldownOutput[];
  const output = Array.isArray(built) ? built.flatMap((each) => each.output) : built.output;
  const chunk = output.find((each) => each.type === 'chunk');
  if (chunk === undefined || chunk.type !== 'chunk') throw new Error('the worker script was not built');
  return chunk.code;
}
