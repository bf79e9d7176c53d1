import { describe, expect, test } from 'vitest';
import { imageFacts } from '#shared/domain/image-size.ts';
import { makePng } from '#tests/support/make-picture.ts';

const bytes = (...values: (number | string)[]) =>
  new Uint8Array(values.flatMap((value) => (typeof value === 'number' ? [value] : [...Buffer.from(value, 'latin1')])));
const pad = (head: Uint8Array, length = 40) => new Uint8Array([...head, ...new Uint8Array(length - head.length)]);

describe('the head of a picture', () => {
  test('of a PNG, gives its width and height', () => {
    expect(imageFacts(makePng(640, 480))).toEqual({ contentType: 'image/png', width: 640, height: 480 });
  });

  test('of a JPEG, is found behind segments of any length', () => {
    const exif = [0xff, 0xe1, 0x00, 0x06, 1, 2, 3, 4];
    const table = [0xff, 0xc4, 0x00, 0x03, 9];
    const frame = [0xff, 0xc2, 0x00, 0x11, 8, 0x01, 0xe0, 0x02, 0x80];
    expect(imageFacts(pad(bytes(0xff, 0xd8, ...exif, ...table, ...frame)))).toEqual({
      ...{ contentType: 'image/jpeg', width: 640, height: 480 },
    });
  });

  test('of a WebP, is read in each of its three forms', () => {
    const riff = ['RIFF', 0, 0, 0, 0, 'WEBP'] as const;
    const lossy = bytes(...riff, 'VP8 ', 0, 0, 0, 0, 0, 0, 0, 0x9d, 0x01, 0x2a, 0x80, 0x02, 0xe0, 0x01);
    const bits = (640 - 1) | ((480 - 1) << 14);
    const packed = [bits & 255, (bits >>> 8) & 255, (bits >>> 16) & 255, (bits >>> 24) & 255];
    const lossless = bytes(...riff, 'VP8L', 0, 0, 0, 0, 0x2f, ...packed);
    const extended = bytes(...riff, 'VP8X', 0, 0, 0, 0, 0, 0, 0, 0, 0x7f, 0x02, 0x00, 0xdf, 0x01, 0x00);
    for (const head of [lossy, lossless, extended]) {
      expect(imageFacts(pad(head))).toEqual({ contentType: 'image/webp', width: 640, height: 480 });
    }
  });

  test('of anything else, or cut off, is none', () => {
    const others = [
      bytes(),
      bytes('GIF89a'),
      pad(bytes('<svg onload="x">')),
      bytes(0xff, 0xd8, 0xff, 0xe1),
      pad(bytes(0xff, 0xd8)),
    ];
    for (const head of others) expect(imageFacts(head)).toBeNull();
    expect(imageFacts(makePng(4, 4).subarray(0, 20))).toBeNull();
  });
});
