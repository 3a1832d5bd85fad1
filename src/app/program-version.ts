import manifest from '../../package.json' with { type: 'json' };

/** Version of the program, as saved files name it. */
export const PROGRAM_VERSION: string = manifest.version;
