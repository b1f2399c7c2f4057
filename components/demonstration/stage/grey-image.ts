/** Bytes of an uncompressed grey picture: header, table of 256 greys, rows from the bottom padded to four bytes. */
function greyBitmap(levels: ArrayLike<number>, width: number, height: number): Uint8Array {
  const row = (width + 3) & ~3;
  const start = 54 + 1024;
  const bytes = new Uint8Array(start + row * height);
  const view = new DataView(bytes.buffer);
  bytes.set([0x42, 0x4d]);
  view.setUint32(2, bytes.length, true);
  view.setUint32(10, start, true);
  view.setUint32(14, 40, true);
  view.setInt32(18, width, true);
  view.setInt32(22, height, true);
  view.setUint16(26, 1, true);
  view.setUint16(28, 8, true);
  view.setUint32(34, row * height, true);
  for (let grey = 0; grey < 256; grey += 1) bytes.set([grey, grey, grey, 0], 54 + 4 * grey);
  for (let y = 0; y < height; y += 1) {
    for (let x = 0; x < width; x += 1) bytes[start + (height - 1 - y) * row + x] = levels[y * width + x]!;
  }
  return bytes;
}

/** A grey picture as an address an SVG image takes: nothing is fetched for it. */
export function greyImageHref(levels: ArrayLike<number>, width: number, height: number): string {
  const bytes = greyBitmap(levels, width, height);
  let text = '';
  for (let i = 0; i < bytes.length; i += 0x8000) text += String.fromCharCode(...bytes.subarray(i, i + 0x8000));
  return `data:image/bmp;base64,${btoa(text)}`;
}
