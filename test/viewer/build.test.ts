import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { beforeAll, describe, expect, test } from 'vitest';

/** The page that `npm run build` makes. */
describe('the built page', () => {
  let html: string;
  let policy: string;
  let scripts: string[];

  beforeAll(async () => {
    html = await readFile(new URL('../../dist/report.html', import.meta.url), 'utf8');
    policy = /<meta http-equiv="Content-Security-Policy" content="([^"]*)">/.exec(html)![1]!;
    scripts = [...html.matchAll(/<script(?: id="page")?>([\s\S]*?)<\/script>/g)].map(([, text]) => text!);
  });

  test('allows exactly its own scripts, by their hashes', () => {
    const hashes = scripts.map((text) => `'sha256-${createHash('sha256').update(text).digest('base64')}'`);
    expect(hashes).toHaveLength(2);
    expect(/script-src ([^;]*)/.exec(policy)![1]!.split(' ')).toEqual(hashes);
    expect(policy).not.toMatch(/unsafe-eval|https?:|script-src[^;]*unsafe-inline/);
    expect(policy).toContain("default-src 'none'");
    expect(policy).toContain("connect-src 'none'");
  });

  test('has one empty block for the data, before the scripts', () => {
    const block = '<script type="application/json" id="perilag-data"></script>';
    expect(html.split(block)).toHaveLength(2);
    expect(html.indexOf(block)).toBeLessThan(html.indexOf('<script id="page">'));
  });

  test('no script holds its own end or a comment that would swallow it', () => {
    for (const text of scripts) expect(text).not.toMatch(/<\/script|<!--/i);
  });

  test('points to nothing outside itself', () => {
    const markup = html.replace(/<script(?: id="page")?>[\s\S]*?<\/script>/g, '');
    expect(markup).not.toMatch(/(src|href)="(?!data:)/);
    expect(markup).not.toMatch(/url\((?!data:)|@import/);
  });
});
