/** The page "Numbers you can trust": published values, computed anew in this browser, and the accuracy table. */
import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, state } from 'lit/decorators.js';

import accuracy from '../../data/accuracy.json';
import published from '../../../testdata/published/checks.json';
import type { Check, CheckOutcome, CheckResult } from '../contract.js';
import { engine, sentences } from '../engine/client.js';
import { figure } from './number-text.js';
import { sharedStyle } from './style.js';
import './table-actions.js';

const checks: readonly Check[] = published.checks;

@customElement('hoop-numbers')
export class HoopNumbers extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      summary { min-height: 44px; padding: 9px 0; cursor: pointer; font-weight: 550; }
      td.name { min-width: 16em; }
      .source { color: var(--soft); font-size: 0.86em; display: block; }
      progress { width: 100%; }
    `,
  ];

  @state() private result: CheckResult | null = null;
  @state() private share = 0;
  @state() private wrong = '';

  override connectedCallback(): void {
    super.connectedCallback();
    void this.run();
  }

  private async run(): Promise<void> {
    this.result = null;
    this.wrong = '';
    const answer = await engine.call('check', { checks: [...checks] }, { key: 'check', onProgress: (share) => { this.share = share; } });
    if (answer.kind === 'result') {
      this.result = answer.result;
    } else if (answer.kind === 'refused') {
      this.wrong = sentences(answer);
    }
  }

  protected override render(): TemplateResult {
    return html`
      <section class="panel" aria-labelledby="checks-title"><h2 id="checks-title">Published values, computed again just now</h2>
        ${this.wrong ? html`<p class="error" role="alert">${this.wrong}</p>` : nothing}
        ${this.result ? this.summary(this.result) : html`<p role="status">Computing…</p><progress max="1" value=${this.share} aria-label="share of the checks done"></progress>`}
        ${this.result ? [...new Set(checks.map((c) => c.group))].map((group) => this.group(group, this.result as CheckResult)) : nothing}
        <div class="actions"><button type="button" @click=${() => void this.run()}>Compute again</button></div>
      </section>
      ${this.accuracy()}`;
  }

  private summary(result: CheckResult): TemplateResult {
    const all = result.agreeing === checks.length;
    return html`<p id="summary" role="status"><span class="chip ${all ? 'pass' : 'fail'}">${all ? 'all agree' : 'some differ'}</span>
      ${result.agreeing} of ${checks.length} values agree within half a unit of the last digit printed, by engine ${engine.version} in this browser.</p>`;
  }

  private group(group: string, result: CheckResult): TemplateResult {
    const rows = checks.map((check, i) => ({ check, outcome: result.outcomes[i] })).filter((r): r is { check: Check; outcome: CheckOutcome } => r.check.group === group && r.outcome !== undefined);
    const agreeing = rows.filter((r) => r.outcome.agrees).length;
    return html`<details ?open=${agreeing < rows.length}><summary>${group}: ${agreeing} of ${rows.length} agree</summary>
      <div class="table-scroll"><table data-group=${group}>
        <thead><tr><th scope="col">value</th><th scope="col" class="number">printed</th><th scope="col" class="number">computed</th><th scope="col" class="number">difference</th><th scope="col" class="number">allowed</th><th scope="col">outcome</th></tr></thead>
        <tbody>${rows.map(({ check, outcome }) => html`<tr>
          <td class="name">${check.name}<span class="source">${check.source}</span></td><td class="number">${check.expected}</td>
          <td class="number">${outcome.problem || outcome.computed}</td><td class="number">${figure(outcome.difference, 2)}</td><td class="number">${figure(outcome.allowed, 2)}</td>
          <td><span class="chip ${outcome.agrees ? 'pass' : 'fail'}">${outcome.agrees ? 'agrees' : 'differs'}</span></td></tr>`)}</tbody>
      </table></div></details>`;
  }

  private accuracy(): TemplateResult {
    return html`<section class="panel" aria-labelledby="accuracy-title"><h2 id="accuracy-title">Accuracy of the Bessel functions</h2>
      <p>Measured against values of 40 digits, in units in the last place (ulp) of the value, or of the envelope
        √(J² + Y²) where the function swings. The table was written when this version was built.</p>
      <div class="table-scroll"><table id="accuracy">
        <thead><tr><th scope="col">region</th><th scope="col" class="number">points</th><th scope="col" class="number">mean, ulp</th><th scope="col" class="number">worst, ulp</th><th scope="col">worst at</th><th scope="col" class="number">promised, ulp</th></tr></thead>
        <tbody>${accuracy.map((r) => html`<tr><td>${r.region}</td><td class="number">${r.points}</td><td class="number">${figure(r.meanUlp, 2)}</td>
          <td class="number">${figure(r.maxUlp, 3)}</td><td>ν = ${figure(r.whereNu, 5)}, x = ${figure(r.whereX, 6)}</td><td class="number">${r.promise}</td></tr>`)}</tbody>
      </table></div>
    </section>`;
  }
}
