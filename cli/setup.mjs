// Runs before `npm start` and `npm test`, with nothing but Node and npm at hand: installs packages when those in
// node_modules are not those of package-lock.json, and builds dist/ when a source is newer than it.
import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('..', import.meta.url));
const at = (path) => join(root, path);
const sources = ['cli', 'sim', 'viewer', 'package.json', 'package-lock.json'];
const products = ['dist/perilag.mjs', 'dist/report.html'];

if (!isInstalled()) npm(['ci', '--include=dev', '--ignore-scripts', '--no-audit', '--no-fund']);
if (!isBuilt()) npm(['run', '--silent', 'build']);

/** Does every package of the lock stand in node_modules in its version? npm notes there what it installed. */
function isInstalled() {
  const noted = at('node_modules/.package-lock.json');
  if (!existsSync(noted)) return false;
  const wanted = JSON.parse(readFileSync(at('package-lock.json'), 'utf8')).packages;
  const found = JSON.parse(readFileSync(noted, 'utf8')).packages;
  return Object.entries(wanted).every(
    ([path, { version, optional }]) =>
      path === '' || (found[path] === undefined ? optional === true : found[path].version === version),
  );
}

function isBuilt() {
  const built = products.map(at);
  if (!built.every((path) => existsSync(path))) return false;
  return newest(sources.map(at)) <= Math.min(...built.map((path) => statSync(path).mtimeMs));
}

/** Time of the latest change among files and all that folders hold. */
function newest(paths) {
  return Math.max(
    0,
    ...paths.map((path) => {
      const { mtimeMs } = statSync(path);
      if (!statSync(path).isDirectory()) return mtimeMs;
      return Math.max(mtimeMs, newest(readdirSync(path).map((name) => join(path, name))));
    }),
  );
}

function npm(words) {
  process.stderr.write(`setup: npm ${words.join(' ')}\n`);
  const windows = process.platform === 'win32';
  // Standard output belongs to the command that comes after.
  const { status, error } = spawnSync('npm', words, { cwd: root, stdio: ['ignore', 2, 2], shell: windows });
  if (status === 0) return;
  process.stderr.write(`setup: npm ${words[0]} failed${error ? `: ${error.message}` : ''}.\n`);
  process.exit(1);
}
