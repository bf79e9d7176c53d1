import type { PhotographType } from './photograph.ts';

export type ImageFacts = { contentType: PhotographType; width: number; height: number };

/** Type and size of a picture by its own first bytes, whatever it is called; null for anything but JPEG, PNG and WebP. */
export function imageFacts(bytes: Uint8Array): ImageFacts | null {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  try {
    return pngFacts(view) ?? webpFacts(view) ?? jpegFacts(view);
  } catch (error) {
    // Cut off in the middle of its head.
    if (error instanceof RangeError) return null;
    throw error;
  }
}

/** PNG (ISO/IEC 15948): the signature, then the header chunk with width and height. */
function pngFacts(view: DataView): ImageFacts | null {
  if (view.byteLength < 24 || view.getUint32(0) !== 0x89504e47 || view.getUint32(4) !== 0x0d0a1a0a) return null;
  if (view.getUint32(12) !== 0x49484452) return null;
  return { contentType: 'image/png', width: view.getUint32(16), height: view.getUint32(20) };
}

/** WebP (RFC 9649): lossy, lossless and extended files say their size each in their own way. */
function webpFacts(view: DataView): ImageFacts | null {
  if (view.byteLength < 30 || view.getUint32(0) !== 0x52494646 || view.getUint32(8) !== 0x57454250) return null;
  const kind = view.getUint32(12);
  const contentType = 'image/webp' as const;
  if (kind === 0x56503820) {
    return { contentType, width: view.getUint16(26, true) & 0x3fff, height: view.getUint16(28, true) & 0x3fff };
  }
  if (kind === 0x5650384c) {
    const bits = view.getUint32(21, true);
    return { contentType, width: (bits & 0x3fff) + 1, height: ((bits >>> 14) & 0x3fff) + 1 };
  }
  if (kind !== 0x56503858) return null;
  const size = (at: number) => view.getUint16(at, true) + (view.getUint8(at + 2) << 16) + 1;
  return { contentType, width: size(24), height: size(27) };
}

/** JPEG (ISO/IEC 10918-1): segment by segment to the frame header. */
function jpegFacts(view: DataView): ImageFacts | null {
  if (view.byteLength < 4 || view.getUint16(0) !== 0xffd8) return null;
  let at = 2;
  while (at < view.byteLength) {
    const marker = view.getUint16(at);
    if (marker < 0xff01) return null;
    const isFrame = marker >= 0xffc0 && marker <= 0xffcf && ![0xffc4, 0xffc8, 0xffcc].includes(marker);
    if (isFrame) return { contentType: 'image/jpeg', height: view.getUint16(at + 5), width: view.getUint16(at + 7) };
    at += 2 + view.getUint16(at + 2);
  }
  return null;
}
