import { cellName } from '../../../functions/engine/graph/address';
import type { FunctionMetadata } from '../../../functions/metadata';
import { namespace } from '../../../functions/names';
import { callAt, suggestions } from './completion';
import type { Suggestion } from './completion';
import { fill, h } from '../../pane/dom';

/** The line in which a cell is edited, with completion of function names and help for the argument at hand. */
export class FormulaBar {
  readonly element: HTMLElement;
  private readonly place: HTMLElement;
  private readonly input: HTMLInputElement;
  private readonly list: HTMLElement;
  private readonly hint: HTMLElement;
  private found: readonly Suggestion[] = [];
  private chosen = 0;
  private shown = '';

  constructor(
    private readonly functions: readonly FunctionMetadata[],
    private readonly natives: readonly string[],
    private readonly listeners: { done(text: string, move: 'down' | 'right' | 'stay'): void; cancelled(): void },
  ) {
    this.place = h('output', { class: 'place', 'aria-label': 'Selected cell' });
    this.list = h('ul', { role: 'listbox', id: 'suggestions', 'aria-label': 'Functions', hidden: true });
    this.hint = h('div', { class: 'hint', role: 'status' });
    this.input = h('input', {
      type: 'text', 'aria-label': 'Content of the cell', spellcheck: 'false', autocomplete: 'off', role: 'combobox', 'aria-expanded': 'false', 'aria-controls': 'suggestions', 'aria-autocomplete': 'list',
      oninput: () => this.suggest(), onclick: () => this.suggest(), onkeydown: (event: KeyboardEvent) => this.onKey(event),
      onblur: () => { if (this.input.value !== this.shown) this.commit('stay'); else this.close(); },
    });
    this.element = h('section', { class: 'formula', 'aria-label': 'Formula line' }, this.place, h('div', { class: 'entry' }, this.input, this.list), this.hint);
  }

  /** Shows what a cell holds. */
  show(row: number, col: number, text: string): void {
    this.place.textContent = cellName(row, col);
    this.shown = text;
    this.input.value = text;
    this.close();
  }

  /** Begins to edit: with what the cell holds, or with the character that was typed over it. */
  begin(typed: string | undefined): void {
    if (typed !== undefined) this.input.value = typed;
    this.input.focus();
    this.input.setSelectionRange(this.input.value.length, this.input.value.length);
    this.suggest();
  }

  private commit(move: 'down' | 'right' | 'stay'): void {
    const text = this.input.value;
    this.shown = text;
    this.close();
    this.listeners.done(text, move);
  }

  private onKey(event: KeyboardEvent): void {
    const open = this.found.length > 0;
    switch (event.key) {
      case 'ArrowDown':
      case 'ArrowUp':
        if (!open) return;
        this.chosen = (this.chosen + (event.key === 'ArrowDown' ? 1 : this.found.length - 1)) % this.found.length;
        this.drawList();
        break;
      case 'Tab':
        if (open) this.take(this.found[this.chosen]);
        else if (this.input.value !== this.shown) this.commit('right');
        else return;
        break;
      case 'Enter':
        this.commit('down');
        break;
      case 'Escape':
        if (open) this.close();
        else {
          this.input.value = this.shown;
          this.listeners.cancelled();
        }
        break;
      default:
        return;
    }
    event.preventDefault();
  }

  private take({ name, from, to }: Suggestion): void {
    const { value } = this.input;
    const opened = value[to] === '(' ? name : `${name}(`;
    this.input.value = value.slice(0, from) + opened + value.slice(to);
    const caret = from + opened.length;
    this.input.setSelectionRange(caret, caret);
    this.suggest();
  }

  private suggest(): void {
    const caret = this.input.selectionStart ?? this.input.value.length;
    this.found = suggestions(this.input.value, caret, this.functions, this.natives);
    this.chosen = 0;
    this.drawList();
    const call = callAt(this.input.value, caret);
    const known = call && this.functions.find((f) => `${namespace}.${f.name}` === call.name);
    if (!known || !this.input.value.startsWith('=')) return fill(this.hint);
    const at = Math.min(call.argument, known.parameters.length - 1);
    const list = known.parameters.flatMap((p, i) => {
      const name = p.repeating ? `${p.name}, …` : p.optional ? `[${p.name}]` : p.name;
      return [i === 0 ? '' : ', ', i === at ? h('strong', {}, name) : name];
    });
    fill(this.hint, `${call.name}(`, ...list, ')', at >= 0 ? `  ${known.parameters[at].description}` : `  ${known.description}`);
  }

  private drawList(): void {
    const open = this.found.length > 0;
    this.list.hidden = !open;
    this.input.setAttribute('aria-expanded', String(open));
    if (open) this.input.setAttribute('aria-activedescendant', `suggestion-${this.chosen}`);
    else this.input.removeAttribute('aria-activedescendant');
    fill(this.list, ...this.found.map((s, i) => h('li', {
      role: 'option', id: `suggestion-${i}`, 'aria-selected': i === this.chosen ? 'true' : 'false',
      onmousedown: (event: MouseEvent) => { event.preventDefault(); this.take(s); },
    }, h('span', {}, s.name), h('small', {}, s.help))));
  }

  private close(): void {
    this.found = [];
    this.drawList();
    fill(this.hint);
  }
}
