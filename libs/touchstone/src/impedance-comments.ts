const title = /^\s*port\s+impedance\s*/i;
const number = /[+-]?(?:\d+\.?\d*|\.\d+)(?:[eEdD][+-]?\d+)?/g;
const onlyNumbers = /^[\s\d.+\-eEdD]*$/;

/**
 * Port impedances that field solvers write behind every point as comments ("! Port Impedance 50 0 50 0", going on in
 * comments that hold numbers only). Ports pairs, or a full matrix whose diagonal counts.
 */
export class ImpedanceComments {
  private numbers: number[] = [];
  private open = false;
  /** Ports pairs a point, in the order met. */
  readonly pairs: number[] = [];
  points = 0;
  /** Points whose impedances did not fit the ports. */
  unfit = 0;
  /** Where a full matrix had entries beside its diagonal. */
  coupled = 0;

  constructor(private readonly ports: number) {}

  /** True where the comment belonged to a list of impedances. */
  comment(text: string): boolean {
    const match = title.exec(text);
    if (match) {
      this.close();
      this.open = true;
      this.take(text.slice(match[0].length));
      return true;
    }
    if (this.open && text.trim() !== '' && onlyNumbers.test(text)) {
      this.take(text);
      return true;
    }
    this.close();
    return false;
  }

  /** To be called where anything but a comment follows. */
  close(): void {
    if (!this.open) return;
    this.open = false;
    const { ports, numbers } = this;
    if (numbers.length === ports * 2) this.pairs.push(...numbers);
    else if (numbers.length === ports * ports * 2) this.takeDiagonal();
    else this.unfit++;
    if (this.pairs.length > this.points * ports * 2) this.points++;
    this.numbers = [];
  }

  private take(text: string): void {
    for (const match of text.matchAll(number)) this.numbers.push(Number(match[0].replace(/[dD]/, 'e')));
  }

  private takeDiagonal(): void {
    const { ports, numbers } = this;
    let beside = false;
    for (let k = 0; k < numbers.length; k++) {
      const entry = k >> 1;
      const onDiagonal = entry % (ports + 1) === 0;
      if (onDiagonal) this.pairs.push(numbers[k]!);
      else if (numbers[k] !== 0) beside = true;
    }
    if (beside) this.coupled++;
  }
}
