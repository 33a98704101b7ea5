import { fill, h } from './dom';
import type { PaneHost } from './PaneHost';
import type { Step, StepContext } from './Steps';
import { budgetStep } from './steps/budget';
import { carryStep } from './steps/carry';
import { checkStep } from './steps/check';
import { evidenceStep } from './steps/evidence';
import { reportStep } from './steps/report';

/**
 * Puts the task pane into an element: the five steps of the job, what happened last, and a way back.
 *
 * @returns a function that takes it away again.
 */
export function mountPane(root: HTMLElement, host: PaneHost): () => void {
  const line = h('div', { class: 'line', role: 'status', 'aria-live': 'polite' });
  const say = (text: string, wrong = false): void => {
    line.textContent = text;
    line.classList.toggle('wrong', wrong);
  };
  const context: StepContext = { host, say, written: [], asked: {} };
  const steps: Step[] = [evidenceStep(context), carryStep(context), budgetStep(context), reportStep(context), checkStep(context)];
  const panel = h('div', { class: 'panel', role: 'tabpanel', id: 'pane-panel', tabindex: 0 });
  const back = h('button', { type: 'button', onclick: () => void takeBack() }, 'Undo');
  let current = -1;

  const tabs = steps.map((step, i) => h('button', {
    type: 'button', role: 'tab', id: `pane-tab-${i}`, 'aria-controls': 'pane-panel', onclick: () => open(i),
    onkeydown: (event: KeyboardEvent) => {
      const move = event.key === 'ArrowRight' || event.key === 'ArrowDown' ? 1 : event.key === 'ArrowLeft' || event.key === 'ArrowUp' ? -1 : 0;
      if (move === 0) return;
      event.preventDefault();
      open((i + move + steps.length) % steps.length);
      tabs[current].focus();
    },
  }, `${i + 1} ${step.title}`));

  function open(i: number): void {
    if (i === current) return;
    if (current >= 0) steps[current].left();
    current = i;
    tabs.forEach((tab, n) => {
      tab.setAttribute('aria-selected', String(n === i));
      tab.tabIndex = n === i ? 0 : -1;
    });
    panel.setAttribute('aria-labelledby', `pane-tab-${i}`);
    fill(panel, steps[i].element);
    say('');
    steps[i].shown();
  }

  async function takeBack(): Promise<void> {
    try {
      say((await host.undo()) ? 'Taken back' : 'Nothing to take back');
    } catch (problem) {
      say(`Not taken back: ${(problem as Error).message}`, true);
    }
  }

  fill(root, h('div', { class: 'rootsum-pane' },
    h('div', { class: 'steps', role: 'tablist', 'aria-label': 'Steps' }, ...tabs),
    panel, line,
    h('footer', {}, back, h('small', {}, 'An aid: validated by the laboratory for its own use; standards, local codes and licensed practice come first.'))));
  open(0);
  return () => {
    if (current >= 0) steps[current].left();
    root.replaceChildren();
  };
}
