/** The file form of a recording: WAV, one channel of 32-bit float samples, so that nothing is rounded. */
export function wavFile(blocks: readonly Float32Array[], rate: number): Uint8Array {
  const count = blocks.reduce((sum, block) => sum + block.length, 0);
  const bytes = new Uint8Array(44 + 4 * count);
  const view = new DataView(bytes.buffer);
  const text = (at: number, s: string): void => bytes.set([...s].map((c) => c.charCodeAt(0)), at);
  text(0, 'RIFF');
  view.setUint32(4, 36 + 4 * count, true);
  text(8, 'WAVEfmt ');
  view.setUint32(16, 16, true);
  view.setUint16(20, 3, true); // IEEE float
  view.setUint16(22, 1, true);
  view.setUint32(24, rate, true);
  view.setUint32(28, 4 * rate, true);
  view.setUint16(32, 4, true);
  view.setUint16(34, 32, true);
  text(36, 'data');
  view.setUint32(40, 4 * count, true);
  let at = 44;
  for (const block of blocks) {
    for (const sample of block) {
      view.setFloat32(at, sample, true);
      at += 4;
    }
  }
  return bytes;
}
