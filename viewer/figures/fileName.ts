/** The name of a finding as a part of a file name: windows carry words of the user. Pure. */
export function fileName(name: string): string {
  return name.replace(/[^\p{L}\p{N}]+/gu, '-').slice(0, 60);
}
