/** The section through the sheet as SVG path data: rim to rim, up is up. */

/** Path of one section. `scale` is the displacement drawn at half the height. */
export function sectionPath(values: Float32Array, factor: number, scale: number, width: number, height: number, margin: number): string {
  const last = values.length - 1;
  if (last < 1) {
    return '';
  }
  const middle = height / 2;
  const reach = scale > 0 ? (factor * (middle - 4)) / scale : 0;
  const parts = new Array<string>(values.length);
  for (let i = 0; i <= last; i++) {
    const x = margin + ((width - 2 * margin) * i) / last;
    const y = middle - (values[i] as number) * reach;
    parts[i] = `${i === 0 ? 'M' : 'L'}${x.toFixed(1)} ${y.toFixed(1)}`;
  }
  return parts.join('');
}
