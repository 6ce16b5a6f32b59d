/** The read-only page of a hand-over: specification, figures as sent beside those computed now, peaks, cautions. */
import { html, nothing, type TemplateResult } from 'lit';

import type { FigureRow, GroupName, HandOverPage } from '../contract.js';
import { assumptionsOpen, cautions } from './notes.js';
import { figure } from './number-text.js';
import { when } from './when.js';

const groupTitles: Readonly<Record<GroupName, string>> = {
  identity: 'Name and place', ring: 'Ring', sheet: 'Sheet', tension: 'Tension', evenness: 'Evenness of the tension',
  attached: 'Attached to the sheet', faces: 'Faces', surroundings: 'Air and service', avoid: 'Frequencies to keep clear of', damping: 'Damping',
};

/** `received` shows both columns of figures; while one's own is prepared they are the same. */
export function handOverView(page: HandOverPage, received: boolean): TemplateResult {
  const groups = (Object.keys(groupTitles) as GroupName[]).filter((g) => page.specification.some((s) => s.group === g));
  return html`
    <section class="panel" aria-labelledby="sent-title">
      <h2 id="sent-title">${page.document.name}</h2>
      <p>${page.document.place}${page.document.place ? '. ' : ''}${page.document.revision > 0 ? `Revision ${page.document.revision}. ` : 'No revision kept. '}Sent ${when(page.sent)}, computed by engine ${page.sentEngine}.</p>
      ${page.document.invented ? html`<p class="note">The data of this diaphragm are invented, for demonstration.</p>` : nothing}
      ${page.verdict ? html`<p id="handed-verdict"><strong>Verdict of the tap:</strong> ${page.verdict}</p>` : nothing}
      <div class="table-scroll"><table id="figures">
        <caption>Figures${page.tapped ? `; tapped ${when(page.tapped)}` : ''}</caption>
        <thead><tr><th scope="col">figure</th>${received ? html`<th scope="col" class="number">as sent</th><th scope="col" class="number">computed now</th>` : html`<th scope="col" class="number">value</th>`}<th scope="col">unit</th></tr></thead>
        <tbody>${page.figures.map((f) => figureRow(f, received))}</tbody></table></div>
      ${received && page.nowEngine !== page.sentEngine ? html`<p class="note">Computed now by engine ${page.nowEngine}.</p>` : nothing}
    </section>
    ${page.peaks.length > 0 ? html`<section class="panel" aria-labelledby="peaks-title"><h2 id="peaks-title">Peaks chosen from the tap</h2>
      <div class="table-scroll"><table><thead><tr><th scope="col" class="number">frequency</th><th scope="col" class="number">standard uncertainty</th><th scope="col">read as (<var>m</var>, <var>n</var>)</th></tr></thead>
      <tbody>${page.peaks.map((p) => html`<tr><td class="number">${figure(p.frequency, 6)} Hz</td><td class="number">${p.uncertainty > 0 ? `${figure(p.uncertainty, 2)} Hz` : '–'}</td><td>${p.n > 0 ? `(${p.m}, ${p.n})` : 'left open'}</td></tr>`)}</tbody></table></div></section>` : nothing}
    <section class="panel" aria-labelledby="spec-title"><h2 id="spec-title">Specification</h2>
      <div class="specs">${groups.map((g) => html`<table class="spec"><caption>${groupTitles[g]}</caption><tbody>${page.specification.filter((s) => s.group === g).map((s) => html`<tr>
        <td class="symbol">${s.symbol}</td><th scope="row">${s.name}</th><td class="value">${s.text} <span class="unit">${s.unit}</span></td></tr>`)}</tbody></table>`)}</div>
    </section>
    ${cautions(page.cautions)}
    ${assumptionsOpen(page.assumptions)}
    <section class="note" aria-label="What this is not"><ul>${page.disclaimers.map((d) => html`<li>${d}</li>`)}</ul></section>`;
}

function figureRow(f: FigureRow, received: boolean): TemplateResult {
  return html`<tr data-figure=${f.id}><th scope="row">${f.name}</th><td class="number">${f.sent}</td>
    ${received ? html`<td class="number">${f.now}${f.differs ? html` <span class="chip hit">differs</span>` : nothing}</td>` : nothing}<td class="unit">${f.unit}</td></tr>`;
}
