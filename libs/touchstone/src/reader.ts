import { finishFile, portReferences } from './assemble';
import { DataBlock } from './data-block';
import { DataSection } from './data-section';
import { ImpedanceComments } from './impedance-comments';
import type { Keywords, KeywordStep } from './keywords';
import { mostPorts, takeKeyword } from './keywords';
import { LineSplitter } from './line-splitter';
import type { Refusal } from './option-line';
import { defaultOption, parseOptionLine, unitPower } from './option-line';
import { decodeText } from './text';
import type { FileWarning, OptionLine, TouchstoneFile } from './touchstone-file';
import { TouchstoneError } from './touchstone-file';

/** Reads a file in chunks of any size; only the numbers are kept. */
export interface TouchstoneReader {
  /** @throws TouchstoneError at the first line that is wrong */
  push(chunk: Uint8Array): void;
  /** @throws TouchstoneError where the file is cut or contradicts itself */
  finish(): TouchstoneFile;
}

const keptComments = 100;
const keptWarnings = 50;
const longestLineBytes = 64 * 1024 * 1024;

/**
 * A reader for Touchstone 1.0, 1.1, 2.0 and 2.1 (IBIS Open Forum). The file is read whole or refused with the line, the reason
 * and how to mend it; nothing is cut, reordered or left out.
 *
 * @param fileName version 1 takes the number of ports from its ending (.s2p)
 */
export function createTouchstoneReader(fileName: string): TouchstoneReader {
  return new Reader(fileName);
}

/** Reads a file that is at hand in one piece. */
export function readTouchstone(fileName: string, bytes: Uint8Array): TouchstoneFile {
  const reader = createTouchstoneReader(fileName);
  reader.push(bytes);
  return reader.finish();
}

type Section = KeywordStep;

class Reader implements TouchstoneReader {
  private readonly splitter = new LineSplitter(
    (bytes, start, end, line) => this.takeLine(bytes, start, end, line),
    longestLineBytes,
    (line) =>
      this.refuse(
        line,
        'The line is longer than 64 MiB.',
        'This is no Touchstone file, or its line ends are lost.',
      ),
  );
  private readonly keywords: Keywords = { seen: new Set() };
  private readonly portsOfName: number | undefined;
  private readonly comments: string[] = [];
  private commentCount = 0;
  private readonly warnings: FileWarning[] = [];
  private option: OptionLine | undefined;
  private optionStated = false;
  private section: Section = 'header';
  private data: DataSection | undefined;
  private lastLine = 0;

  constructor(private readonly fileName: string) {
    const ending = /\.[sghyz](\d{1,5})p$/i.exec(fileName)?.[1];
    this.portsOfName = ending === undefined ? undefined : Number(ending);
  }

  push(chunk: Uint8Array): void {
    this.splitter.push(chunk);
  }

  finish(): TouchstoneFile {
    this.splitter.finish();
    this.data?.impedances.close();
    if (this.section === 'information') {
      this.refuse(
        this.lastLine,
        '[Begin Information] is never closed.',
        'Add [End Information]; the file may be cut.',
      );
    }
    const data = this.data;
    data?.endPoint(this.lastLine);
    if (!data || data.block.points === 0) {
      this.refuse(this.lastLine, 'The file holds no network data.', 'Export it again with its data.');
    }
    return finishFile({
      fileName: this.fileName,
      lastLine: this.lastLine,
      keywords: this.keywords,
      option: this.option ?? defaultOption,
      block: data.block,
      impedances: data.impedances,
      noise: data.noise,
      comments: this.comments,
      commentCount: this.commentCount,
      warnings: this.warnings,
      refuse: (line, reason, mend) => this.refuse(line, reason, mend),
      warn: (line, text) => this.warn(line, text),
    });
  }

  private refuse(line: number, reason: string, mend: string): never {
    throw new TouchstoneError(this.fileName, line, reason, mend);
  }

  private check<T extends object | string>(result: T | Refusal, line: number): T {
    if (typeof result === 'object' && 'reason' in result && 'mend' in result) {
      this.refuse(line, result.reason, result.mend);
    }
    return result;
  }

  private warn(line: number, text: string): void {
    if (this.warnings.length < keptWarnings) this.warnings.push({ line, text });
  }

  private takeLine(bytes: Uint8Array, from: number, end: number, line: number): void {
    let start = from;
    if (line === 1 && bytes[start] === 0xef && bytes[start + 1] === 0xbb && bytes[start + 2] === 0xbf)
      start += 3;
    if (line === 1) this.refuseForeign(bytes, start, end);
    while (start < end && isSpace(bytes[start]!)) start++;
    // A lone 26 is the end mark of old DOS files.
    if (start >= end || (start === end - 1 && bytes[start] === 26)) return;
    this.lastLine = line;
    const first = bytes[start]!;
    if (first === 33) {
      this.takeComment(bytes, start + 1, end);
      return;
    }
    if (this.section === 'information') {
      this.takeInformation(bytes, start, end, line);
      return;
    }
    if (first === 35) this.takeOption(bytes, start + 1, end, line);
    else if (first === 91) this.takeKeywordLine(bytes, start, end, line);
    else if (this.section === 'reference') this.takeReference(bytes, start, end, line);
    else this.takeData(bytes, start, end, line);
  }

  private refuseForeign(bytes: Uint8Array, start: number, end: number): void {
    const utf16 =
      (bytes[start] === 0xff && bytes[start + 1] === 0xfe) ||
      (bytes[start] === 0xfe && bytes[start + 1] === 0xff);
    if (utf16) this.refuse(1, 'The file is UTF-16 text.', 'Save it as plain ASCII or UTF-8.');
    if (bytes.subarray(start, Math.min(end, start + 1000)).includes(0)) {
      this.refuse(1, 'The file holds zero bytes: it is not text.', 'Export the data as a Touchstone file.');
    }
  }

  private takeComment(bytes: Uint8Array, start: number, end: number): void {
    this.commentCount++;
    const wanted = this.comments.length < keptComments;
    if (!wanted && !this.data) return;
    const text = decodeText(bytes, start, end, 64 * 1024);
    if (this.data?.impedances.comment(text)) return;
    if (wanted && text.trim()) this.comments.push(text.trim().slice(0, 500));
  }

  private textOf(bytes: Uint8Array, start: number, end: number): string {
    const text = decodeText(bytes, start, end, 64 * 1024);
    const comment = text.indexOf('!');
    return (comment < 0 ? text : text.slice(0, comment)).trim();
  }

  private takeInformation(bytes: Uint8Array, start: number, end: number, line: number): void {
    const text = this.textOf(bytes, start, end);
    if (/^\[\s*end\s+information\s*\]/i.test(text)) this.section = 'header';
    else if (/^\[\s*(network data|begin information)/i.test(text)) {
      this.refuse(
        line,
        `${text.slice(0, 40)} stands inside [Begin Information].`,
        'Close it with [End Information] first.',
      );
    }
  }

  private takeOption(bytes: Uint8Array, start: number, end: number, line: number): void {
    if (this.optionStated) {
      this.warn(line, 'A second option line; the first one holds and this one is ignored.');
      return;
    }
    if (this.data) {
      this.refuse(line, 'The option line stands behind data.', 'Put it before the first data line.');
    }
    this.optionStated = true;
    this.option = this.check(parseOptionLine(this.textOf(bytes, start, end)), line);
  }

  private takeKeywordLine(bytes: Uint8Array, start: number, end: number, line: number): void {
    const text = this.textOf(bytes, start, end);
    this.data?.endPoint(line);
    if (this.section === 'end') {
      this.refuse(line, `${text.slice(0, 40)} stands behind [End].`, 'Remove what follows [End].');
    }
    const isVersion = /^\[\s*version\s*\]/i.test(text);
    if (!this.keywords.version && !isVersion) {
      this.refuse(
        line,
        `${text.slice(0, 40)} stands before [Version].`,
        'Begin a version 2 file with [Version] 2.0.',
      );
    }
    if (isVersion && (this.option || this.data)) {
      this.refuse(
        line,
        '[Version] does not stand first.',
        'Put [Version] before the option line and the data.',
      );
    }
    const step = this.check(takeKeyword(this.keywords, text), line);
    if (this.data && step !== 'noise' && step !== 'end' && step !== 'information') {
      this.refuse(line, `${text.slice(0, 40)} stands behind the data.`, 'Put it before [Network Data].');
    }
    if (step === 'network') this.begin(line);
    if (step === 'noise' && this.data?.block.ports !== 2) {
      this.refuse(line, '[Noise Data] stands in a file without 2-port network data.', 'Remove it.');
    }
    if (step === 'noise') this.data?.beginNoise();
    this.section = step;
  }

  private takeReference(bytes: Uint8Array, start: number, end: number, line: number): void {
    const ports = this.keywords.ports;
    const reference = this.keywords.reference ?? [];
    if (ports !== undefined && reference.length >= ports) {
      this.section = 'header';
      this.takeData(bytes, start, end, line);
      return;
    }
    reference.push(...this.textOf(bytes, start, end).split(/\s+/));
  }

  private begin(line: number): DataSection {
    const { keywords } = this;
    if (!this.option) {
      if (keywords.version && keywords.version !== '1.0') {
        this.refuse(line, 'The option line (#) is missing.', 'Add one, such as # GHz S MA R 50.');
      }
      this.option = defaultOption;
      this.warn(line, 'There is no option line (#); GHz, S, MA and 50 ohm are taken.');
    }
    const ports = this.portsOf(line);
    const version2 = keywords.version === '2.0' || keywords.version === '2.1';
    if (version2 && ports === 2 && !keywords.twoPortOrder) {
      this.refuse(
        line,
        '[Two-Port Data Order] is missing, so S12 and S21 cannot be told apart.',
        'Add it: 21_12 or 12_21.',
      );
    }
    this.checkParameter(line, ports);
    const block = new DataBlock(
      ports,
      keywords.matrixFormat ?? 'Full',
      version2 ? (keywords.twoPortOrder ?? '12_21') : '21_12',
      this.option.format,
    );
    // Fail here, not after the data have been read.
    portReferences(this.option, keywords, ports, (reason, mend) => this.refuse(line, reason, mend));
    this.data = new DataSection(block, new ImpedanceComments(ports), {
      version2,
      decibels: this.option.format === 'DB',
      shift: unitPower[this.option.unit],
      portsFrom: keywords.ports === undefined ? 'name' : '[Number of Ports]',
      refuse: (at, reason, mend) => this.refuse(at, reason, mend),
      warn: (at, text) => this.warn(at, text),
    });
    return this.data;
  }

  private checkParameter(line: number, ports: number): void {
    const parameter = this.option?.parameter ?? 'S';
    if ((parameter === 'H' || parameter === 'G') && ports !== 2) {
      this.refuse(
        line,
        `${parameter} parameters of ${ports} ports do not exist.`,
        'They are for 2 ports only.',
      );
    }
  }

  private portsOf(line: number): number {
    const version2 = this.keywords.version === '2.0' || this.keywords.version === '2.1';
    const said = this.keywords.ports;
    if (version2 && said === undefined) {
      this.refuse(line, '[Number of Ports] is missing.', 'Add it before [Network Data].');
    }
    const ports = said ?? this.portsOfName;
    if (ports === undefined) {
      this.refuse(
        line,
        'The number of ports is unknown: the name ends in no .sNp.',
        'Name the file .s2p, .s4p and so on.',
      );
    }
    if (ports < 1 || ports > mostPorts) {
      this.refuse(line, `The file claims ${ports} ports.`, `Files of 1 to ${mostPorts} ports are read.`);
    }
    if (said !== undefined && this.portsOfName !== undefined && said !== this.portsOfName) {
      this.refuse(
        line,
        `[Number of Ports] is ${said}, but the name says ${this.portsOfName}.`,
        'Correct the name or the keyword.',
      );
    }
    return ports;
  }

  private takeData(bytes: Uint8Array, start: number, end: number, line: number): void {
    if (this.section === 'header' || this.section === 'reference') {
      if (this.keywords.version && this.keywords.version !== '1.0')
        this.missingNetworkData(bytes, start, end, line);
      this.section = 'network';
      this.begin(line);
    }
    if (this.section === 'end')
      this.refuse(line, 'Data stand behind [End].', 'Remove them, or move [End] to the end.');
    this.data?.take(bytes, start, end, line);
  }

  /** Data without their keyword: unambiguous where ports and frequencies are known, as in an example of the specification. */
  private missingNetworkData(bytes: Uint8Array, start: number, end: number, line: number): void {
    const { ports, frequencies } = this.keywords;
    const first = bytes[start]!;
    const number = (first >= 48 && first <= 57) || first === 43 || first === 45 || first === 46;
    if (number && ports !== undefined && frequencies !== undefined) {
      this.warn(line, '[Network Data] is missing before the data.');
      return;
    }
    const text = this.textOf(bytes, start, end).slice(0, 40);
    this.refuse(line, `"${text}" stands before [Network Data].`, 'Put data behind [Network Data].');
  }
}

function isSpace(byte: number): boolean {
  return byte === 32 || (byte >= 9 && byte <= 13) || byte === 0xa0;
}
