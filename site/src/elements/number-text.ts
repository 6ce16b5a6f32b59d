/** Figures for show. Units and physics belong to the engine; this only writes digits. */

/** A number to `digits` significant digits, without exponent where people would not write one. */
export function figure(value: number, digits = 4): string {
  if (!Number.isFinite(value)) {
    return '–';
  }
  if (value === 0) {
    return '0';
  }
  const size = Math.abs(value);
  if (size >= 1e6 || size < 1e-4) {
    const [mantissa, exponent] = value.toExponential(digits - 1).split('e');
    return `${mantissa?.replace('-', '−')} × 10${superscript(Number(exponent))}`;
  }
  // Of the rounded value: 999.96 to four digits is 1000, not 1000.0.
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(Number(size.toPrecision(digits)))));
  return value.toFixed(decimals).replace('-', '−');
}

/** The same without zeros that say nothing, for figures that a person typed. */
export function brief(value: number, digits = 5): string {
  return figure(value, digits).replace(/(\.\d*?)0+(?=$| )/, '$1').replace(/\.(?=$| )/, '');
}

/** A share as percent, with a sign where asked. */
export function percent(share: number, digits = 2, signed = false): string {
  const value = share * 100;
  const text = figure(Math.abs(value), digits);
  return `${value < 0 ? '−' : signed && value > 0 ? '+' : ''}${text} %`;
}

function superscript(n: number): string {
  return String(n).replace(/./g, (c) => (c === '-' ? '⁻' : ('⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(c)] ?? c)));
}
