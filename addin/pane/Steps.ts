import type { PaneHost } from './PaneHost';
import type { Written } from './writeColumn';

/** What the steps of the pane share. */
export interface StepContext {
  readonly host: PaneHost;
  /** Tells the user in the pane's own line; `wrong` marks a refusal. */
  say(text: string, wrong?: boolean): void;
  /** Columns that the pane wrote, for the plan. */
  readonly written: Written[];
}

/** One of the five steps: draws itself into its panel, and is told when it is shown and left. */
export interface Step {
  readonly title: string;
  readonly element: HTMLElement;
  shown(): void;
  left(): void;
}
