/** Greyscale pictures as PNG (ISO/IEC 15948): 8 bits, no palette, no times, so that the same picture gives the same bytes. */
import { deflateSync } from 'node:zlib';

const SIGNATURE = Uint8Array.of(137, 80, 78, 71, 13, 10, 26, 10);

const CRC_TABLE = Int32Array.from({ length: 256 }, (_, byte) => {
  let c = byte;
  for (let bit = 0; bit < 8; bit++) c = c & 1 ? 0xedb88320 ^ (c >>> 1) : c >>> 1;
  return c;
});

/** CRC-32 as PNG, ZIP and many others take it. */
function crc32(data: Uint8Array): number {
  let c = -1;
  for (const byte of data) c = CRC_TABLE[(c ^ byte) & 255]! ^ (c >>> 8);
  return (c ^ -1) >>> 0;
}

function chunk(type: string, data: Uint8Array): Uint8Array {
  const all = new Uint8Array(12 + data.length);
  const view = new DataView(all.buffer);
  view.setUint32(0, data.length);
  for (let i = 0; i < 4; i++) all[4 + i] = type.charCodeAt(i);
  all.set(data, 8);
  view.setUint32(8 + data.length, crc32(all.subarray(4, 8 + data.length)));
  return all;
}

/** Each row by its differences to the row above or to the pixel on the left, whichever are smaller in sum. */
function filtered(grey: Uint8Array, widthPx: number, heightPx: number): Uint8Array {
  const out = new Uint8Array((widthPx + 1) * heightPx);
  for (let y = 0; y < heightPx; y++) {
    const row = y * widthPx;
    let left = 0;
    let up = 0;
    for (let x = 0; x < widthPx; x++) {
      const value = grey[row + x]!;
      const byLeft = (value - (x > 0 ? grey[row + x - 1]! : 0)) & 255;
      const byUp = (value - (y > 0 ? grey[row + x - widthPx]! : 0)) & 255;
      left += Math.min(byLeft, 256 - byLeft);
      up += Math.min(byUp, 256 - byUp);
    }
    const useUp = up <= left;
    const at = y * (widthPx + 1);
    out[at] = useUp ? 2 : 1;
    for (let x = 0; x < widthPx; x++) {
      const before = useUp ? (y > 0 ? grey[row + x - widthPx]! : 0) : x > 0 ? grey[row + x - 1]! : 0;
      out[at + 1 + x] = grey[row + x]! - before;
    }
  }
  return out;
}

/** @param grey row by row from the top, 0 = black .. 255 = white */
export function greyPng(grey: Uint8Array, widthPx: number, heightPx: number): Uint8Array<ArrayBuffer> {
  if (grey.length !== widthPx * heightPx) throw new RangeError(`${grey.length} pixels for ${widthPx} x ${heightPx}`);
  const head = new Uint8Array(13);
  const view = new DataView(head.buffer);
  view.setUint32(0, widthPx);
  view.setUint32(4, heightPx);
  head[8] = 8;
  const parts = [
    SIGNATURE,
    chunk('IHDR', head),
    chunk('IDAT', deflateSync(filtered(grey, widthPx, heightPx), { level: 7 })),
    chunk('IEND', new Uint8Array(0)),
  ];
  const whole = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}
