/** The revision letter after those in use: A ... Z, AA, AB ... */
export function nextLetter(used: readonly string[]): string {
  const highest = Math.max(0, ...used.map((letter) => numberOf(letter.replace(/\d+$/, ''))));
  return letterOf(highest + 1);
}

function numberOf(letters: string): number {
  return [...letters].reduce((sum, letter) => sum * 26 + letter.charCodeAt(0) - 64, 0);
}

function letterOf(number: number): string {
  const rest = Math.floor((number - 1) / 26);
  return (rest > 0 ? letterOf(rest) : '') + String.fromCharCode(65 + ((number - 1) % 26));
}
