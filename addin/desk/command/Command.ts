import type { Terminal } from './Terminal';

export interface Surroundings {
  readonly terminal: Terminal;
  /** Where the built functions lie. */
  readonly folder: string;
}

/** Runs with the arguments that follow its name. @returns the exit status. */
export type Command = (args: readonly string[], surroundings: Surroundings) => Promise<number>;
