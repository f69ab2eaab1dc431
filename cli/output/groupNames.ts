/** Names of cases as CF 1.11 §2.3 recommends names: letters, digits and underscores, a letter first. */

/** One for each, all different: `thick air` → `thick_air`, `5 bar` → `case_5_bar`. */
export function groupNames(names: readonly string[]): readonly string[] {
  const taken = new Set<string>();
  return names.map((name) => {
    const plain = plainName(name);
    const choices = [plain, ...names.map((_, index) => `${plain}_${index + 2}`)];
    const free = choices.find((choice) => !taken.has(choice))!;
    taken.add(free);
    return free;
  });
}

function plainName(name: string): string {
  const letters = name
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .replace(/[^A-Za-z0-9]+/g, '_')
    .replace(/^_|_$/g, '');
  return /^[A-Za-z]/.test(letters) ? letters : `case${letters && '_'}${letters}`;
}
