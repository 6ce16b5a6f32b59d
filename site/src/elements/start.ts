/** The start page: the diaphragm that is open, and where to go. */
import { css, html, LitElement, type TemplateResult } from 'lit';
import { customElement } from 'lit/decorators.js';

import { pageHref } from '../pages.js';
import { SessionController } from '../session/controller.js';
import { session } from '../session/session.js';
import { caution } from './notes.js';
import './mode-drawing.js';
import { sharedStyle } from './style.js';

const steps = [
  { page: 'specify', title: 'Specify', words: 'ring, sheet, tension, air, and the frequencies to keep clear of' },
  { page: 'modes', title: 'Modes', words: 'where it rings, and how near that is to what excites it' },
  { page: 'respond', title: 'Respond', words: 'how far it travels and how long it rings after a knock' },
  { page: 'tap', title: 'Tap', words: 'on site: the tension from a tap and a microphone' },
  { page: 'hand-over', title: 'Hand over', words: 'a link, a file or a print-out for the client' },
] as const;

@customElement('hoop-start')
export class HoopStart extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      ol { list-style: none; padding: 0; margin: 0; }
      li { border-bottom: 1px solid var(--rule); }
      li a { display: block; padding: 12px 4px; min-height: 44px; text-decoration: none; color: var(--ink); }
      li a strong { color: var(--teal); text-decoration: underline; text-underline-offset: 0.18em; text-decoration-thickness: 1px; }
    `,
  ];

  constructor() {
    super();
    new SessionController(this);
  }

  protected override render(): TemplateResult {
    const { document } = session;
    return html`<section class="panel" aria-labelledby="open-title"><div class="split">
      <div>
        <h2 id="open-title">${document ? document.name : 'Opening…'}</h2>
        <p>${document?.place ?? ''}</p>
        ${document?.invented ? html`<p class="note">This is a demonstration; its data are invented. Change anything, or make a new diaphragm in
          <a href=${pageHref('records')}>Records</a>.</p>` : ''}
        <ol>${steps.map((s) => html`<li><a href=${pageHref(s.page)}><strong>${s.title}</strong>: ${s.words}</a></li>`)}</ol>
      </div>
      <div class="drawing"><h2>Mode (1, 2)</h2><hoop-mode-drawing .m=${1} .n=${2} .clamps=${document?.ring.clamps ?? 0}></hoop-mode-drawing></div>
    </div></section>
    ${session.cautions.slice(-3, -2).map((c) => caution(c))}`;
  }
}
