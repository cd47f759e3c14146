import { css } from 'lit';

/** How buttons, fields and lists look everywhere. */
export const controls = css`
  :host {
    box-sizing: border-box;
  }
  *,
  *::before,
  *::after {
    box-sizing: inherit;
  }
  button,
  select,
  input {
    font: inherit;
    color: inherit;
    background: var(--paper);
    border: 1px solid var(--rule);
    border-radius: 2px;
    min-height: 28px;
    padding: 2px 8px;
  }
  button {
    cursor: pointer;
  }
  button:hover:not(:disabled) {
    border-color: var(--ink);
  }
  button:disabled {
    color: var(--ink-soft);
    cursor: default;
    opacity: 0.6;
  }
  button[aria-pressed='true'] {
    border-color: var(--ink);
    border-bottom-width: 2px;
  }
  :focus-visible {
    outline: 2px solid var(--moved);
    outline-offset: 1px;
  }
  .quiet {
    border-color: transparent;
    background: none;
  }
  h2 {
    margin: 0;
    font-size: 13px;
    font-weight: 600;
    letter-spacing: 0.02em;
  }
`;
