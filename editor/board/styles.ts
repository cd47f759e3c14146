import { css } from 'lit';

/** The board's ground, its links by line type, clouds and tools. */
export const boardStyles = css`
  :host {
    display: block;
    position: relative;
    overflow: hidden;
    background: var(--ground);
  }
  .area {
    position: absolute;
    inset: 0;
    touch-action: none;
  }
  .empty {
    position: absolute;
    inset: 0;
    display: grid;
    place-content: center;
    text-align: center;
    color: var(--ink-soft);
    pointer-events: none;
  }
  .tools {
    position: absolute;
    left: 8px;
    top: 8px;
    display: flex;
    flex-wrap: wrap;
    gap: 4px;
  }
  .rubber {
    position: absolute;
    border: 1px dashed var(--moved);
    pointer-events: none;
  }
  .band-head {
    fill: var(--ink-soft);
    font-size: 22px;
  }
  svg.links {
    position: absolute;
    overflow: visible;
    width: 1px;
    height: 1px;
    pointer-events: none;
  }
  .link {
    fill: none;
    stroke: var(--ink-soft);
    stroke-width: 1;
  }
  .link.geometry {
    stroke-dasharray: 14 3 2 3;
  }
  .link.structure {
    stroke-width: 2.5;
  }
  .link.virtual {
    stroke-dasharray: 7 4;
  }
  .link.results {
    stroke-width: 4;
  }
  .link.inner {
    stroke: var(--ground);
    stroke-width: 2;
  }
  .link.near {
    stroke: var(--ink);
  }
  .link.drawing {
    stroke: var(--moved);
    stroke-width: 2;
  }
  .cloud {
    fill: none;
    stroke: var(--over);
    stroke-width: 2;
  }
  .cloud-text {
    fill: var(--over);
    font-size: 12px;
  }
`;
