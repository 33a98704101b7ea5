import type { PaneHost } from './PaneHost';
import type { Written } from './writeColumns';

/** What the steps of the pane share. */
export interface StepContext {
  readonly host: PaneHost;
  /** Tells the user in the pane's own line; `wrong` marks a refusal. */
  say(text: string, wrong?: boolean): void;
  /** What the pane wrote, step by step, for the plan. */
  readonly written: { readonly step: object; readonly columns: readonly Written[] }[];
  /** The occupied place of which the user was told last: a second press for it writes over. */
  readonly asked: { place?: string };
}

/** One of the five steps: draws itself into its panel, and is told when it is shown and left. */
export interface Step {
  readonly title: string;
  readonly element: HTMLElement;
  shown(): void;
  left(): void;
}
