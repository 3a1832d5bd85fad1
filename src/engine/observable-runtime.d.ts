/** The runtime ships no types: the part of it the engine uses. */
declare module '@observablehq/runtime' {
  export interface Observer {
    /** Told synchronously, before the variable is computed again. */
    pending?(): void;
    fulfilled?(value: unknown): void;
    rejected?(error: unknown): void;
  }
  export interface Variable {
    define(name: string, inputs: readonly string[], definition: (...inputs: never[]) => unknown): Variable;
    delete(): Variable;
  }
  export interface Module {
    variable(observer?: Observer): Variable;
  }
  export class Runtime {
    constructor(builtins: null, global: (name: string) => unknown);
    module(): Module;
    dispose(): void;
    /** When the next pass runs; by itself it waits for an animation frame, and there are none in a hidden tab. */
    _computeSoon: () => Promise<void>;
    _computeNow(): Promise<void>;
  }
}
