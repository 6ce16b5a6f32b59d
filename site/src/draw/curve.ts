/**
 * Curves by uPlot, behind this one file. The host element must adopt `curveStyle` in its shadow root, since uPlot's
 * own style sheet does not reach inside.
 */
import { unsafeCSS } from 'lit';
import uPlot from 'uplot';
import text from 'uplot/dist/uPlot.min.css';

import { colour } from '../elements/style.js';

export const curveStyle = unsafeCSS(text);

export interface CurveSeries {
  readonly label: string;
  /** Palette colour, such as "ink" or "up". */
  readonly colour: string;
  readonly dash?: number[];
  readonly width?: number;
}

export interface CurveOptions {
  readonly xLabel: string;
  readonly yLabel: string;
  readonly series: readonly CurveSeries[];
  readonly height: number;
  /** Fixed range of y; free where left out. */
  readonly yRange?: readonly [number, number];
  /** Fixed range of x; all of the data where left out. */
  readonly xRange?: readonly [number, number] | undefined;
  /** Called after each drawing, to add marks in canvas pixels. */
  readonly after?: (plot: uPlot) => void;
}

export type CurveData = readonly [Float32Array | number[], ...(Float32Array | number[])[]];

/** One curve panel. Call `show` with new data, `destroy` when the element goes. */
export class Curve {
  private plot: uPlot | null = null;
  private theme = '';
  private xRange: readonly [number, number] | undefined;

  constructor(private readonly host: HTMLElement) {}

  show(options: CurveOptions, data: CurveData): void {
    this.xRange = options.xRange;
    const width = Math.max(160, this.host.clientWidth);
    const theme = colour(this.host, 'ink') + options.series.length + options.xLabel + options.yLabel;
    if (this.plot && theme !== this.theme) {
      this.destroy();
    }
    if (!this.plot) {
      this.theme = theme;
      this.plot = new uPlot(this.build(options, width), data as unknown as uPlot.AlignedData, this.host);
      return;
    }
    if (this.plot.width !== width || this.plot.height !== options.height) {
      this.plot.setSize({ width, height: options.height });
    }
    this.plot.setData(data as unknown as uPlot.AlignedData);
  }

  destroy(): void {
    this.plot?.destroy();
    this.plot = null;
  }

  private build(options: CurveOptions, width: number): uPlot.Options {
    const ink = colour(this.host, 'soft');
    const grid = colour(this.host, 'rule');
    const axis = (label: string): uPlot.Axis => ({
      label,
      stroke: ink,
      grid: { stroke: grid, width: 1 },
      ticks: { stroke: grid, width: 1 },
      font: '13px system-ui, sans-serif',
      labelFont: '13px system-ui, sans-serif',
    });
    const range = options.yRange;
    return {
      width,
      height: options.height,
      scales: { x: { time: false, range: (_plot, least, most) => [this.xRange?.[0] ?? least, this.xRange?.[1] ?? most] }, y: range ? { range: [range[0], range[1]] } : {} },
      axes: [axis(options.xLabel), axis(options.yLabel)],
      legend: { show: options.series.length > 1, live: false },
      cursor: { drag: { x: false, y: false } },
      series: [
        { label: options.xLabel },
        ...options.series.map((s) => ({
          label: s.label,
          stroke: colour(this.host, s.colour),
          width: s.width ?? 1.5,
          points: { show: false },
          ...(s.dash ? { dash: s.dash } : {}),
        })),
      ],
      hooks: options.after ? { draw: [options.after] } : {},
    };
  }
}
