/** Notes and cautions as every element shows them: icon, word and border, never colour alone. */
import { html, svg, type TemplateResult } from 'lit';

const triangle = svg`<svg class="icon" viewBox="0 0 24 24" aria-hidden="true"><path d="M12 3 22 21H2Z" fill="none"
  stroke="currentColor" stroke-width="2" stroke-linejoin="round"></path><path d="M12 9.5v5.5M12 17.2v1.6"
  stroke="currentColor" stroke-width="2.2" stroke-linecap="round"></path></svg>`;

/** A caution about harm, or about a figure that must not be trusted. */
export function caution(content: unknown, title = 'Caution'): TemplateResult {
  return html`<div class="note caution" role="note"><p class="note-title">${triangle} ${title}</p><p>${content}</p></div>`;
}

export function cautions(sentences: readonly string[]): TemplateResult[] {
  return sentences.map((s) => caution(s));
}

/** Sentences of assumptions under the figures that rest on them. */
export function assumptions(sentences: readonly string[]): TemplateResult {
  return html`<details class="assumptions"><summary>What this assumes</summary><ul>${sentences.map((s) => html`<li>${s}</li>`)}</ul></details>`;
}

/** The same where nothing may be folded away: on what is handed over. */
export function assumptionsOpen(sentences: readonly string[]): TemplateResult {
  return html`<section class="note" aria-label="What this assumes"><p class="note-title">What this assumes</p><ul>${sentences.map((s) => html`<li>${s}</li>`)}</ul></section>`;
}
