import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { controls } from '../look/controls.ts';

/** One thing to choose. */
export interface Choice {
  readonly id: string;
  readonly title: string;
  readonly group: string;
  readonly help: string;
}

/**
 * A list to choose from by typing: for nodes of the stock, and for outputs to link. Fires `chosen` with the id,
 * or `closed`.
 */
export class Chooser extends LitElement {
  static override properties = {
    choices: { attribute: false },
    heading: {},
    empty: {},
    text: { state: true },
    at: { state: true },
  };

  declare choices: readonly Choice[];
  declare heading: string;
  declare empty: string;
  declare text: string;
  declare at: number;

  static override styles = [
    controls,
    css`
      dialog {
        border: 1px solid var(--ink);
        background: var(--paper);
        color: var(--ink);
        padding: 12px;
        width: min(440px, 92vw);
      }
      dialog::backdrop {
        background: rgb(0 0 0 / 25%);
      }
      input {
        width: 100%;
        margin: 8px 0;
      }
      ul {
        list-style: none;
        margin: 0;
        padding: 0;
        max-height: 46vh;
        overflow: auto;
      }
      li.group {
        color: var(--ink-soft);
        font-size: 12px;
        padding: 6px 6px 2px;
      }
      li.choice {
        padding: 5px 6px;
        cursor: pointer;
        border-left: 3px solid transparent;
      }
      li.choice[aria-selected='true'] {
        border-left-color: var(--moved);
        background: var(--ground);
      }
      small {
        display: block;
        color: var(--ink-soft);
      }
    `,
  ];

  private ended = false;

  constructor() {
    super();
    this.choices = [];
    this.heading = '';
    this.empty = 'Nothing fits.';
    this.text = '';
    this.at = 0;
  }

  override firstUpdated(): void {
    const dialog = this.renderRoot.querySelector('dialog');
    dialog?.showModal();
    dialog?.addEventListener('close', () => this.end());
    this.renderRoot.querySelector('input')?.focus();
  }

  override render(): TemplateResult {
    const shown = this.shown();
    let group = '';
    return html`<dialog aria-label=${this.heading}>
      <h2>${this.heading}</h2>
      <input
        type="search"
        placeholder="Type to find"
        aria-label="Find"
        role="combobox"
        aria-expanded="true"
        aria-controls="list"
        aria-activedescendant="choice-${this.at}"
        .value=${this.text}
        @input=${(event: Event) => {
          this.text = (event.target as HTMLInputElement).value;
          this.at = 0;
        }}
        @keydown=${this.key}
      />
      <ul id="list" role="listbox" aria-label=${this.heading}>
        ${shown.map((choice, i) => {
          const heading =
            choice.group === group
              ? nothing
              : html`<li class="group" role="presentation">${choice.group}</li>`;
          group = choice.group;
          return html`${heading}
            <li
              class="choice"
              role="option"
              id="choice-${i}"
              aria-selected=${i === this.at}
              @click=${() => this.take(choice)}
            >
              ${choice.title}<small>${choice.help}</small>
            </li>`;
        })}
      </ul>
      ${shown.length === 0 ? html`<p>${this.choices.length === 0 ? this.empty : 'Nothing is called that.'}</p>` : nothing}
    </dialog>`;
  }

  private shown(): readonly Choice[] {
    const words = this.text.toLowerCase().split(/\s+/).filter(Boolean);
    const score = ({ title, group, help }: Choice): number => {
      const name = title.toLowerCase();
      if (words.every((word) => name.includes(word))) return name.startsWith(words[0] ?? '') ? 0 : 1;
      const all = `${name} ${group} ${help}`.toLowerCase();
      return words.every((word) => all.includes(word)) ? 2 : 3;
    };
    const found = this.choices.map((choice) => [score(choice), choice] as const).filter(([s]) => s < 3);
    return (words.length === 0 ? found : found.toSorted((a, b) => a[0] - b[0])).map(([, choice]) => choice);
  }

  private key(event: KeyboardEvent): void {
    const shown = this.shown();
    const step = event.key === 'ArrowDown' ? 1 : event.key === 'ArrowUp' ? -1 : 0;
    if (step !== 0) {
      event.preventDefault();
      this.at = Math.max(0, Math.min(shown.length - 1, this.at + step));
      this.renderRoot.querySelector(`#choice-${this.at}`)?.scrollIntoView({ block: 'nearest' });
    } else if (event.key === 'Enter') {
      event.preventDefault();
      const choice = shown[this.at];
      if (choice !== undefined) this.take(choice);
    }
  }

  private take(choice: Choice): void {
    this.dispatchEvent(new CustomEvent('chosen', { detail: choice.id }));
    this.end();
  }

  /** The dialog's own event of closing comes late; whoever asked is told once, and at once. */
  private end(): void {
    if (this.ended) return;
    this.ended = true;
    this.dispatchEvent(new CustomEvent('closed'));
  }
}

customElements.define('sk-chooser', Chooser);
