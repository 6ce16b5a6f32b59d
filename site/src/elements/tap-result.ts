/** What the peaks of a tap say: the tension with its verdict, what it rests on, and what else they could say. */
import { html, nothing, type TemplateResult } from 'lit';

import type { IdealReading, Reading, Share, TapResult } from '../contract.js';
import { assumptions, caution, cautions } from './notes.js';
import { figure, percent } from './number-text.js';
import './table-actions.js';

export function tapResult(result: TapResult): TemplateResult {
  const best = result.readings[0];
  return html`
    ${result.airNote ? caution(result.airNote, 'Read this first: the moving air is not accounted for') : nothing}
    ${best ? html`<p class="answer" id="tension">${figure(best.tension, 4)} N/m <span class="chip ${result.verdict}">${result.verdict}</span></p>
      <p>${best.high > best.low ? `95 % interval ${figure(best.low, 4)} to ${figure(best.high, 4)} N/m; ` : ''}${best.matches.length > 1 ? `spread of the peaks ${percent(best.spread, 2)}; ` : ''}specified
        ${figure(result.lower, 4)} to ${figure(result.upper, 4)} N/m.</p>` : nothing}
    <p id="reason">${result.reason}</p>
    ${result.ideal ? idealReading(result.ideal) : nothing}
    ${!result.chosen && result.readings.length > 1 ? rivals(result.readings) : nothing}
    ${result.budget.length > 0 ? budget(result.budget) : nothing}
    ${cautions(result.cautions)}
    ${assumptions(result.assumptions)}`;
}

function idealReading(ideal: IdealReading): TemplateResult {
  return html`<p id="ideal">The ideal sheet, without fluid, stiffness or cavity, would make ${figure(ideal.tension, 4)} N/m of the same peaks:
    the diaphragm has ${figure(ideal.factor, 3)} times that. Its peaks miss that reading by up to ${percent(ideal.misfit, 2)}, and this one by up to ${percent(ideal.realMisfit, 2)}.</p>`;
}

function rivals(readings: readonly Reading[]): TemplateResult {
  return html`<h3>Rival readings</h3><div class="table-scroll"><table id="rivals">
    <thead><tr><th scope="col" class="number">tension</th><th scope="col" class="number">odds</th><th scope="col">peaks read as</th></tr></thead>
    <tbody>${readings.map((r) => html`<tr><td class="number">${figure(r.tension, 4)} N/m</td><td class="number">${percent(r.odds, 2)}</td>
      <td>${r.matches.map((m) => `${m.peak + 1} = (${m.m}, ${m.n})${m.upper ? ' upper' : ''}`).join('; ')}</td></tr>`)}</tbody></table></div>
    <p>The page does not choose between them. Set foreign peaks aside, or say which mode a peak is.</p>`;
}

/** The budget of the uncertainty, what matters most first. */
function budget(shares: readonly Share[]): TemplateResult {
  const table = {
    name: 'uncertainty',
    heads: ['from', 'standard uncertainty of it, relative', 'percent of tension per percent of it', 'standard uncertainty of the tension, relative', 'share of the variance'],
    rows: shares.map((s) => [s.name, s.input, s.sensitivity, s.relative, s.share]),
  };
  return html`<details id="budget"><summary>What the uncertainty comes from: first ${shares[0]?.name}</summary>
    <div class="table-scroll"><table>
      <thead><tr><th scope="col">from</th><th scope="col" class="number">known to</th><th scope="col" class="number">tension to</th><th scope="col" class="number">share</th></tr></thead>
      <tbody>${shares.map((s) => html`<tr><th scope="row">${s.name}</th><td class="number">${s.input > 0 ? percent(s.input, 2) : '–'}</td>
        <td class="number">${percent(s.relative, 2)}</td><td class="number">${percent(s.share, 2)}</td></tr>`)}</tbody>
    </table></div>
    <p class="soft">Standard uncertainties, each alone; the share is that of the variance of the tension.</p>
    <hoop-table-actions .table=${table} .whole=${shares}></hoop-table-actions></details>`;
}
