import { crc32, deflateSync } from 'node:zlib';
import { describe, expect, test } from 'vitest';
import { unpackedBytes, unpackedText } from '../../../viewer/report/dataUrl.ts';
import { pixelsAcross, pngWithDensity, svgInMillimetres } from '../../../viewer/report/printSize.ts';

function chunk(type: string, data: Uint8Array): Buffer {
  const body = Buffer.concat([Buffer.from(type, 'latin1'), data]);
  const made = Buffer.alloc(body.length + 8);
  made.writeUInt32BE(data.length, 0);
  body.copy(made, 4);
  made.writeUInt32BE(crc32(body), body.length + 4);
  return made;
}

const signature = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);
const header = chunk('IHDR', Buffer.from([0, 0, 0, 1, 0, 0, 0, 1, 8, 0, 0, 0, 0]));
const rest = [chunk('IDAT', deflateSync(Buffer.from([0, 0]))), chunk('IEND', Buffer.alloc(0))];
const png = Buffer.concat([signature, header, ...rest]);

/** 300 dpi is 11,811 pixels a metre: 300/0.0254 = 11811.02. */
const density = chunk('pHYs', Buffer.from([0, 0, 0x2e, 0x23, 0, 0, 0x2e, 0x23, 1]));

describe('pngWithDensity', () => {
  test('a chunk with its check, behind the header; zlib agrees on the check', () => {
    expect(Buffer.from(pngWithDensity(png, 300))).toEqual(Buffer.concat([signature, header, density, ...rest]));
  });

  test('one that is there is replaced', () => {
    expect(Buffer.from(pngWithDensity(pngWithDensity(png, 72), 300))).toEqual(Buffer.from(pngWithDensity(png, 300)));
  });

  test('part of a larger buffer', () => {
    const within = Buffer.concat([Buffer.from('before'), png]).subarray(6);
    expect(Buffer.from(pngWithDensity(within, 300))).toEqual(Buffer.from(pngWithDensity(png, 300)));
  });

  test('what is no PNG is refused', () => {
    expect(() => pngWithDensity(Buffer.from('GIF89a and some more bytes behind it'), 300)).toThrow('no PNG');
  });
});

describe('svgInMillimetres', () => {
  test('the root alone; the view box and what is inside stay', () => {
    const svg = '<svg width="850" height="484" viewBox="0 0 850 484"><rect width="850" height="484"/></svg>';
    expect(svgInMillimetres(svg, 180, 102.49411)).toBe(
      '<svg width="180mm" height="102.494mm" viewBox="0 0 850 484"><rect width="850" height="484"/></svg>',
    );
  });
});

test('pixelsAcross: 180 mm at 300 dpi', () => {
  expect(pixelsAcross(180, 300)).toBe(2126);
  expect(pixelsAcross(25.4, 300)).toBe(300);
});

test('data URLs: text with its signs, and base64', () => {
  expect(unpackedText('data:image/svg+xml,%3Csvg%3E%C3%A9%2C%25')).toBe('<svg>é,%');
  expect([...unpackedBytes('data:image/png;base64,iVBORw==')]).toEqual([0x89, 0x50, 0x4e, 0x47]);
});
