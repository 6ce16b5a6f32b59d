/** The recording and its spectrum, drawn, with the peaks numbered. */
import { css, html, LitElement, svg, type TemplateResult } from 'lit';
import { customElement, property, query, state } from 'lit/decorators.js';

import type { PeaksResult } from '../contract.js';
import { Curve, curveStyle } from '../draw/curve.js';
import { themeChanged } from '../shell/theme.js';
import { colour, sharedStyle } from './style.js';

const waveWidth = 600;
const waveHeight = 70;

@customElement('hoop-spectrum')
export class HoopSpectrum extends LitElement {
  static override styles = [
    sharedStyle,
    curveStyle,
    css`
      svg { display: block; width: 100%; height: 70px; }
      .wave { fill: none; stroke: var(--ink); stroke-width: 1; vector-effect: non-scaling-stroke; }
      .used { fill: var(--teal-wash); stroke: var(--teal); vector-effect: non-scaling-stroke; }
      #curve { min-height: 260px; }
    `,
  ];

  @property({ attribute: false }) result: PeaksResult | null = null;
  @property({ attribute: false }) frequencies: readonly number[] = [];
  @state() private whole = false;
  @query('#curve') private host!: HTMLElement | null;
  private curve: Curve | null = null;
  private readonly redraw = (): void => this.draw();

  override connectedCallback(): void {
    super.connectedCallback();
    addEventListener(themeChanged, this.redraw);
    addEventListener('resize', this.redraw);
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    removeEventListener(themeChanged, this.redraw);
    removeEventListener('resize', this.redraw);
    this.curve?.destroy();
    this.curve = null;
  }

  protected override updated(): void {
    this.draw();
  }

  private draw(): void {
    const { result, host } = this;
    if (!result || !host) {
      return;
    }
    this.curve ??= new Curve(host);
    this.curve.show({
      xLabel: 'frequency, Hz',
      yLabel: 'level, dB below the largest',
      height: 280,
      yRange: [-90, 8],
      xRange: this.range(result),
      series: [{ label: 'spectrum', colour: 'ink', width: 1.2 }, { label: 'noise floor', colour: 'soft', dash: [4, 4] }],
      after: (plot) => {
        const { ctx } = plot;
        ctx.save();
        ctx.fillStyle = colour(this, 'rust');
        ctx.font = `600 ${13 * devicePixelRatio}px system-ui, sans-serif`;
        ctx.textAlign = 'center';
        this.frequencies.forEach((frequency, i) => {
          const height = this.result?.peaks.find((p) => p.frequency === frequency)?.height ?? -3;
          ctx.fillText(String(i + 1), plot.valToPos(frequency, 'x', true), plot.valToPos(height, 'y', true) - 6 * devicePixelRatio);
        });
        ctx.restore();
      },
    }, [result.frequencies, result.levels, result.floor]);
  }

  /** The part with the peaks, a little beyond the highest; the whole where asked for. */
  private range(result: PeaksResult): readonly [number, number] | undefined {
    const highest = Math.max(0, ...this.frequencies);
    const last = result.frequencies[result.frequencies.length - 1] ?? 0;
    return this.whole || highest === 0 ? undefined : [0, Math.min(last, 1.4 * highest)];
  }

  private wave(): TemplateResult {
    const { result } = this;
    if (!result) {
      return html``;
    }
    const columns = result.waveform.length / 2;
    const largest = result.waveform.reduce((most, v) => Math.max(most, Math.abs(v)), 1e-9);
    const y = (v: number): string => (waveHeight / 2 - (v / largest) * (waveHeight / 2 - 2)).toFixed(1);
    let path = '';
    for (let i = 0; i < columns; i++) {
      const x = ((i * waveWidth) / columns).toFixed(1);
      path += `M${x} ${y(result.waveform[2 * i] as number)}V${y(result.waveform[2 * i + 1] as number)}`;
    }
    const from = (result.from / result.length) * waveWidth;
    return html`<svg viewBox="0 0 ${waveWidth} ${waveHeight}" preserveAspectRatio="none" role="img"
      aria-label="The recording; the stretch that is read begins at ${result.from.toFixed(2)} seconds and lasts ${result.analysed.toFixed(2)} seconds">
      ${svg`<rect class="used" x=${from} y="1" width=${(result.analysed / result.length) * waveWidth} height=${waveHeight - 2}></rect><path class="wave" d=${path}></path>`}
    </svg>`;
  }

  protected override render(): TemplateResult {
    return html`${this.wave()}<div id="curve"></div>
      <div class="actions"><button type="button" aria-pressed=${this.whole ? 'true' : 'false'} @click=${() => { this.whole = !this.whole; }}>Whole spectrum</button></div>`;
  }
}
