/** Copies a table that is shown as tab-separated text, and saves it as CSV or JSON. */

export interface ShownTable {
  readonly name: string;
  readonly heads: readonly string[];
  readonly rows: readonly (readonly (string | number)[])[];
}

export function asTsv(table: ShownTable): string {
  return lines(table, '\t', (cell) => cell.replace(/[\t\r\n]+/g, ' '));
}

/** CSV as in RFC 4180. A text that a spreadsheet might run as a formula is kept from it by an apostrophe. */
export function asCsv(table: ShownTable): string {
  return lines(table, ',', (cell) => {
    const safe = /^[=+@]|^-(?![\d.])/.test(cell) ? `'${cell}` : cell;
    return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
  });
}

function lines(table: ShownTable, separator: string, cell: (text: string) => string): string {
  return [table.heads, ...table.rows].map((row) => row.map((c) => cell(String(c))).join(separator)).join('\r\n') + '\r\n';
}

/** Puts text on the clipboard; where the browser refuses (plain http), by the old way. Says whether it worked. */
export async function copyText(text: string): Promise<boolean> {
  try {
    await navigator.clipboard.writeText(text);
    return true;
  } catch {
    const area = document.createElement('textarea');
    area.value = text;
    area.setAttribute('readonly', '');
    area.className = 'unseen';
    document.body.append(area);
    area.select();
    // The only way on plain http; deprecated, and still in every browser.
    const done = document.execCommand('copy');
    area.remove();
    return done;
  }
}

/** Offers bytes or text as a file to save. */
export function saveFile(name: string, content: string | Uint8Array, type: string): void {
  const url = URL.createObjectURL(new Blob([content as BlobPart], { type }));
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  document.body.append(link);
  link.click();
  link.remove();
  setTimeout(() => URL.revokeObjectURL(url), 10_000);
}
