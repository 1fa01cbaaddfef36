const lineFeed = 10;
const carriageReturn = 13;

/** Called for each line; the byte at `end` exists and is a line end. */
export type LineTaker = (bytes: Uint8Array, start: number, end: number, line: number) => void;

/**
 * Splits chunks into lines (LF, CRLF, or CR alone where the first line shows it). Only an unfinished line is kept between
 * chunks; whole lines are handed out where they lie, without a copy.
 */
export class LineSplitter {
  private pending = new Uint8Array(1024);
  private length = 0;
  private line = 0;
  private carriageReturnsOnly: boolean | undefined;

  constructor(
    private readonly take: LineTaker,
    private readonly longestLine: number,
    private readonly tooLong: (line: number) => never,
  ) {}

  push(chunk: Uint8Array): void {
    let start = 0;
    if (this.length > 0) {
      const end = chunk.indexOf(lineFeed);
      if (end < 0) {
        this.keep(chunk, 0, chunk.length);
        return;
      }
      this.keep(chunk, 0, end + 1);
      const length = this.length - 1;
      this.length = 0;
      this.emit(this.pending, 0, length);
      start = end + 1;
    }
    for (let end = chunk.indexOf(lineFeed, start); end >= 0; end = chunk.indexOf(lineFeed, start)) {
      this.emit(chunk, start, end);
      start = end + 1;
    }
    if (start < chunk.length) this.keep(chunk, start, chunk.length);
  }

  finish(): void {
    if (this.length === 0) return;
    this.keep(Uint8Array.of(lineFeed), 0, 1);
    const length = this.length - 1;
    this.length = 0;
    this.emit(this.pending, 0, length);
  }

  private keep(chunk: Uint8Array, start: number, end: number): void {
    const wanted = this.length + end - start;
    if (wanted > this.longestLine) this.tooLong(this.line + 1);
    if (wanted > this.pending.length) {
      const larger = new Uint8Array(Math.max(wanted, this.pending.length * 2));
      larger.set(this.pending.subarray(0, this.length));
      this.pending = larger;
    }
    this.pending.set(chunk.subarray(start, end), this.length);
    this.length = wanted;
  }

  private emit(bytes: Uint8Array, start: number, end: number): void {
    if (this.carriageReturnsOnly === undefined) {
      const at = bytes.subarray(start, end).indexOf(carriageReturn);
      this.carriageReturnsOnly = at >= 0 && start + at < end - 1;
    }
    if (this.carriageReturnsOnly) {
      let from = start;
      for (let k = start; k < end; k++) {
        if (bytes[k] !== carriageReturn) continue;
        this.take(bytes, from, k, ++this.line);
        from = k + 1;
      }
      if (from < end) this.take(bytes, from, end, ++this.line);
      return;
    }
    this.take(bytes, start, end, ++this.line);
  }
}
