/** The choices of this browser: units, the name put on taps, the address of links. */
import { html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, state } from 'lit/decorators.js';

import type { Settings } from '../contract.js';
import { sentences } from '../engine/client.js';
import { SessionController } from '../session/controller.js';
import { session } from '../session/session.js';
import { sharedStyle } from './style.js';

@customElement('hoop-settings')
export class HoopSettings extends LitElement {
  static override styles = [sharedStyle];

  @state() private wrong = '';
  @state() private said = '';

  constructor() {
    super();
    new SessionController(this);
  }

  private async change(change: Partial<Settings>): Promise<void> {
    const answer = await session.changeSettings({ ...session.settings, units: session.system, ...change });
    this.wrong = answer.kind === 'refused' ? sentences(answer) : '';
    this.said = answer.kind === 'result' ? 'Kept.' : '';
  }

  protected override render(): TemplateResult {
    const { settings, system, team } = session;
    const text = (event: Event): string => (event.target as HTMLInputElement).value.trim();
    return html`<section class="panel" aria-labelledby="settings-title"><h2 id="settings-title">Settings of this browser</h2>
      <p><label for="units">Units that fields are first shown in</label><br />
        <select id="units" @change=${(e: Event) => void this.change({ units: text(e) as Settings['units'] })}>
          <option value="si" ?selected=${system === 'si'}>SI: mm, N/m, °C</option>
          <option value="inch-pound" ?selected=${system === 'inch-pound'}>inch-pound: in, lbf/in, °F</option>
        </select></p>
      <p><label for="by">Name put on new taps</label><br /><input id="by" maxlength="80" autocomplete="name" .value=${settings.by} @change=${(e: Event) => void this.change({ by: text(e) })} /></p>
      <p><label for="address">Address that hand-over links start with</label><br />
        <input id="address" maxlength="300" inputmode="url" placeholder=${team.team.linkAddress || 'the address of this page'} .value=${settings.linkAddress} aria-describedby="address-help"
          @change=${(e: Event) => void this.change({ linkAddress: text(e) })} /></p>
      <p class="help" id="address-help">Where clients reach a copy of these pages, such as https://example.org/hoopsheet/hand-over.html. Left empty, links start with this page's own address.</p>
      ${team.problems.map((p) => html`<p class="error">${p.message} Tell whoever hosts these pages.</p>`)}
      ${this.wrong ? html`<p class="error" role="alert">${this.wrong}</p>` : nothing}
      <p role="status">${this.said}</p>
    </section>`;
  }
}
