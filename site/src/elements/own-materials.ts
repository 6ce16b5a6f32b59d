/** Sheet materials: the catalogue with its sources, and those that were added in this browser. */
import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, state } from 'lit/decorators.js';

import type { CatalogueEntry, Material } from '../contract.js';
import { engine, sentences } from '../engine/client.js';
import { SessionController } from '../session/controller.js';
import { session } from '../session/session.js';
import { sharedStyle } from './style.js';

@customElement('hoop-own-materials')
export class HoopOwnMaterials extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      summary { min-height: 44px; padding: 9px 0; cursor: pointer; color: var(--teal); }
      form { display: flex; gap: 10px 16px; flex-wrap: wrap; align-items: end; margin: 6px 0 12px; }
      form label { flex: 1 1 16em; }
      form input { width: 100%; }
      ul { padding-inline-start: 1.2em; }
      li { margin-bottom: 8px; }
    `,
  ];

  @state() private catalogue: readonly CatalogueEntry[] = [];
  @state() private said = '';
  @state() private wrong = '';
  /** The list before the last material was taken out, for as long as it can be put back. */
  @state() private takenOut: { readonly list: readonly Material[]; readonly name: string } | null = null;

  constructor() {
    super();
    new SessionController(this);
  }

  private async readCatalogue(event: Event): Promise<void> {
    if ((event.target as HTMLDetailsElement).open && this.catalogue.length === 0) {
      const answer = await engine.call('materials', {}, { quick: true });
      this.catalogue = answer.kind === 'result' ? answer.result.materials : [];
    }
  }

  private async put(list: readonly Material[], said: string): Promise<void> {
    const answer = await session.changeMaterials(list);
    this.wrong = answer.kind === 'result' ? '' : sentences(answer);
    this.said = answer.kind === 'result' ? said : '';
  }

  /** Keeps the sheet's figures under its name; a material of that name is replaced. */
  private async keep(event: Event): Promise<void> {
    event.preventDefault();
    const sheet = session.document?.sheet;
    if (!sheet) {
      return;
    }
    const name = (sheet.material ?? '').trim();
    if (name === '') {
      this.wrong = 'The sheet has no name of a material yet: type one in its field above.';
      return;
    }
    const source = String(new FormData(event.target as HTMLFormElement).get('source') ?? '').trim();
    const material: Material = {
      id: `own ${name}`, name, density: sheet.density ?? 0, e: sheet.e ?? 0, nu: sheet.nu ?? 0, cte: sheet.cte ?? 0, allowableStress: sheet.allowableStress ?? 0, source,
    };
    this.takenOut = null;
    await this.put([...session.ownMaterials.filter((m) => m.id !== material.id), material], `${name} is kept on this device, and offered in the list of materials.`);
  }

  private async takeOut(material: Material): Promise<void> {
    const list = session.ownMaterials;
    await this.put(list.filter((m) => m.id !== material.id), '');
    if (this.wrong === '') {
      this.takenOut = { list, name: material.name };
    }
  }

  private async putBack(): Promise<void> {
    const { takenOut } = this;
    if (takenOut) {
      this.takenOut = null;
      await this.put(takenOut.list, `${takenOut.name} is back.`);
    }
  }

  protected override render(): TemplateResult | typeof nothing {
    if (!session.document) {
      return nothing;
    }
    const own = session.ownMaterials;
    return html`<details id="own-materials"><summary>Materials of your own${own.length > 0 ? `: ${own.length}` : ''}</summary>
      <p>Fill in the sheet's fields from a certificate or a test, then keep them here: they are offered with the other materials from then on,
        on this device and in files of records. A diaphragm keeps the figures it was given, whatever becomes of the material.</p>
      <form @submit=${(e: Event) => void this.keep(e)}>
        <label>Where these figures come from <input name="source" maxlength="300" autocomplete="off" placeholder="certificate, test, date" /></label>
        <button>Keep the sheet's figures as a material</button>
      </form>
      ${this.wrong ? html`<p class="error" role="alert">${this.wrong}</p>` : nothing}
      <p role="status">${this.said}</p>
      ${this.takenOut ? html`<p class="note" role="status">${this.takenOut.name} is taken out. <button type="button" @click=${() => void this.putBack()}>Undo</button></p>` : nothing}
      ${own.length > 0 ? html`<ul>${own.map((m) => html`<li>${m.name}${m.source ? html` <span class="soft">(${m.source})</span>` : nothing}
        <button type="button" class="grave" aria-label="Take out ${m.name}" @click=${() => void this.takeOut(m)}>Take out</button></li>`)}</ul>` : nothing}
    </details>
    <details id="catalogue" @toggle=${(e: Event) => void this.readCatalogue(e)}><summary>Typical figures, and where they come from</summary>
      <ul>${this.catalogue.map((m) => html`<li><strong>${m.name}</strong>: ${m.figures}.<br /><span class="soft">${m.source}</span></li>`)}</ul>
    </details>`;
  }
}
