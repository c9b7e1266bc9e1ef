// The mark: an open belt on two pulleys, its tight side drawn strong.

import { html, svg } from 'lit';

export const mark = () =>
  html`<svg class="mark" viewBox="0 0 30 20" width="30" height="20" aria-hidden="true">${svg`
  <g fill="none" stroke="currentColor">
    <circle cx="6.5" cy="11" r="3.75" stroke-width="1.25" />
    <circle cx="21.5" cy="10" r="7" stroke-width="1.25" />
    <path d="M5.7 7.33 20.1 3.14" stroke-width="2.5" />
    <path d="M6.2 14.74 21 16.98" stroke-width="1.25" />
  </g>`}</svg>`;
