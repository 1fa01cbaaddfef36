import {
  createTouchstoneReader,
  networkOfFile,
  readTouchstone,
  TouchstoneError,
  type TouchstoneFile,
} from './index';

const bytesOf = (text: string): Uint8Array => new TextEncoder().encode(text);
const read = (name: string, text: string): TouchstoneFile => readTouchstone(name, bytesOf(text));
const refusal = (name: string, text: string): TouchstoneError => {
  try {
    read(name, text);
  } catch (error) {
    if (error instanceof TouchstoneError) return error;
    throw error;
  }
  throw new Error('The file was read.');
};
const dB = (re: number, im: number): number => 20 * Math.log10(Math.hypot(re, im));

describe('version 1', () => {
  it('reads the check file of the format sheet: two ports column-wise, dB, R 75', () => {
    const { network } = read('check.s2p', '# MHZ S DB R 75\n100 -20 10 -1 -30 -60 -31 -20 12\n');
    expect([...network.frequenciesHz]).toEqual([1e8]);
    expect([...network.referenceOhm]).toEqual([75, 0, 75, 0]);
    const [s11, s12, s21, s22] = [0, 2, 4, 6].map((k) => dB(network.s[k]!, network.s[k + 1]!));
    expect([s11, s12, s21, s22].map((x) => Number(x!.toFixed(9)))).toEqual([-20, -60, -1, -20]);
  });
  it.each([
    '# GHZ S MA R 50',
    '# r 50 ma s ghz',
    '#S R 50 GHz MA',
    '#',
    '# ghz',
    '#\tMA\tR\t5E1 ! with a comment',
    '# R 5D1',
  ])('takes the option line %j as GHz, S, MA, 50 ohm', (option) => {
    const { network } = read('a.s1p', `${option}\n1 0.5 90\n`);
    expect(network.frequenciesHz[0]).toBe(1e9);
    expect(network.s[1]).toBeCloseTo(0.5, 15);
    expect(network.referenceOhm[0]).toBe(50);
  });
  it('takes the defaults where the option line is missing, and says so', () => {
    const file = read('a.s1p', '1 0.5 0\n');
    expect(file.network.frequenciesHz[0]).toBe(1e9);
    expect(file.warnings[0]).toMatchObject({ line: 1, text: expect.stringMatching(/no option line/) });
  });
  it('ignores a second option line, and says so', () => {
    const file = read('a.s1p', '# MHz S RI R 50\n# GHz S RI R 75\n1 0.5 0\n');
    expect(file.network.frequenciesHz[0]).toBe(1e6);
    expect(file.warnings).toEqual([{ line: 2, text: expect.stringMatching(/second option line/) }]);
  });
  it.each([
    ['# GHz S MA R 50 Q', /"Q"/],
    ['# GHz MHz', /unit twice/],
    ['# R', /R without a value/],
    ['# R -50', /not above zero/],
  ])('refuses the option line %j', (option, reason) => {
    expect(refusal('a.s1p', `${option}\n1 0.5 0\n`)).toMatchObject({
      line: 1,
      reason: expect.stringMatching(reason),
    });
  });
  it.each(['\n', '\r\n', '\r'])('reads lines that end in %j', (end) => {
    const text = ['! head', '# Hz S RI R 50', '1 0.1 0.2', '2 0.3 0.4', ''].join(end);
    expect([...read('a.s1p', text).network.s]).toEqual([0.1, 0.2, 0.3, 0.4]);
  });
  it('reads a byte order mark, tabs, signs, three-digit and D exponents, and no line end behind the last row', () => {
    const file = read('a.s1p', '\ufeff! é\n# Hz S RI R 50\n+1.000\t-8.5E-004 +1.4d-3');
    expect([...file.network.s]).toEqual([-8.5e-4, 1.4e-3]);
    expect(file.comments).toEqual(['é']);
  });
  it('reads Latin-1 comments and non-breaking spaces, and names the latter', () => {
    const bytes = Uint8Array.of(
      ...bytesOf('! '),
      0xe9,
      ...bytesOf('\n# Hz S RI R 50\n1'),
      0xa0,
      ...bytesOf('0.5 0\n'),
    );
    const file = readTouchstone('a.s1p', bytes);
    expect(file.comments).toEqual(['é']);
    expect(file.network.s[0]).toBe(0.5);
    expect(file.warnings[0]!.text).toMatch(/Non-breaking/);
  });
  it.each([
    '0.1',
    '123456789012345678',
    '0.12345678901234567890',
    '1e-310',
    '4.9e-324',
    '9007199254740993',
    '-2.2250738585072014e-308',
    '.5',
    '5.',
    '00012.50',
    '1E22',
    '1.7976931348623157e308',
  ])('rounds %s as the language does', (token) => {
    expect(read('a.s1p', `# Hz S RI R 50\n1 ${token} 0\n`).network.s[0]).toBe(Number(token));
  });
  it('gives the frequency the double nearest to its decimal value in Hz', () => {
    const { network } = read('a.s1p', '# GHz S RI R 50\n0.0201 0 0\n1.1 0 0\n12.890625 0 0\n');
    expect([...network.frequenciesHz]).toEqual([20100000, 1.1e9, 12.890625e9]);
  });
  it('takes minus infinity dB as zero and says so, and refuses it elsewhere', () => {
    const file = read('a.s1p', '# Hz S DB R 50\n0 -inf 0\n');
    expect([...file.network.s]).toEqual([0, 0]);
    expect(file.warnings[0]!.text).toMatch(/minus infinity/);
    expect(refusal('a.s1p', '# Hz S RI R 50\n0 -inf 0\n').line).toBe(2);
    expect(refusal('a.s1p', '# Hz S RI R 50\n0 NaN 0\n').reason).toMatch(/"NaN" is no number/);
  });
  it('reads rows of four ports wrapped at any pair', () => {
    const numbers = Array.from({ length: 32 }, (_, k) => k + 1);
    const lines = [
      `7 ${numbers.slice(0, 4).join(' ')}`,
      ...[1, 2, 3, 4, 5, 6, 7].map((k) => numbers.slice(k * 4, k * 4 + 4).join(' ')),
    ];
    expect([...read('a.s4p', `# Hz S RI R 50\n${lines.join('\n')}\n`).network.s]).toEqual(numbers);
  });
  it('reads the noise rows behind a 2-port, with the resistance in ohm', () => {
    const file = read(
      'a.s2p',
      '# GHz S MA R 50\n2 1 0 1 0 1 0 1 0\n22 1 0 1 0 1 0 1 0\n4 .7 .64 69 .38\n18 2.7 .46 -33 .40\n',
    );
    expect(file.network.frequenciesHz).toHaveLength(2);
    expect(file.noise.map((row) => [row.frequencyHz, row.noiseResistanceOhm])).toEqual([
      [4e9, 19],
      [18e9, 20],
    ]);
  });
  it('normalises Z by the reference, as version 1 stores it, and Y, H and G likewise', () => {
    expect(read('a.z1p', '# HZ Z RI R 50\n1 1 0\n').network.s[0]).toBeCloseTo(0, 15);
    expect(read('a.s1p', '# HZ Y RI R 75\n1 3 0\n').network.s[0]).toBeCloseTo(-0.5, 15);
    // A series impedance of 25 ohm at 50 ohm: h = [0.5, 1; -1, 0]; S11 = 0.2, S21 = 0.8 (Pozar, table 4.1).
    const h = read('a.s2p', '# HZ H RI R 50\n1 0.5 0 -1 0 1 0 0 0\n').network.s;
    [0.2, 0, 0.8, 0, 0.8, 0, 0.2, 0].forEach((value, k) => expect(h[k]).toBeCloseTo(value, 14));
    // The same as G: I1 = 0 V1 - ... needs the shunt form: 0.02 S in shunt, S11 = -1/3, S21 = 2/3.
    const g = read('a.s2p', '# HZ G RI R 50\n1 1 0 1 0 -1 0 0 0\n').network.s;
    [-1 / 3, 0, 2 / 3, 0, 2 / 3, 0, -1 / 3, 0].forEach((value, k) => expect(g[k]).toBeCloseTo(value, 14));
  });
});

describe('what is refused, with its line', () => {
  const head = '# Hz S RI R 50\n';
  it.each([
    ['a row cut short', 'a.s2p', `${head}1 1 2 3 4 5 6 7\n`, 2, /8 numbers/],
    ['a last row cut short', 'a.s4p', `${head}1 1 2 3 4 5 6 7 8\n1 2 3 4 5 6 7 8\n`, 3, /17 of its 33/],
    [
      'a missing row in the middle',
      'a.s3p',
      `${head}1 1 2 3 4 5 6\n1 2 3 4 5 6\n2 1 2 3 4 5 6\n`,
      4,
      /13 of its 19/,
    ],
    ['a row too long', 'a.s1p', `${head}1 1 2 3 4\n`, 2, /more than the 3 numbers/],
    ['more ports than the name says', 'a.s2p', `${head}1 1 2 3 4 5 6 7 8\n1 2 3 4 5 6 7 8\n`, 3, /8 numbers/],
    ['descending frequencies', 'a.s1p', `${head}2 0 0\n1 0 0\n`, 3, /follows 2 Hz/],
    ['a frequency given twice', 'a.s1p', `${head}2 0 0\n2 0 0\n`, 3, /stands twice/],
    ['a negative frequency', 'a.s1p', `${head}-2 0 0\n`, 2, /from 0 up/],
    ['a decimal comma', 'a.s1p', `${head}1 0,5 0\n`, 2, /comma/],
    ['letters', 'a.s1p', `${head}1 x 0\n`, 2, /"x" is no number/],
    ['two numbers grown together', 'a.s1p', `${head}1 0.5-0.5 0\n`, 2, /no number/],
    ['no data', 'a.s2p', head, 1, /holds no network data/],
    ['an empty file', 'a.s2p', '', 0, /holds no network data/],
    ['a name without ports', 'a.txt', `${head}1 0 0\n`, 2, /number of ports is unknown/],
    ['a claim of 99999 ports', 'a.s99999p', `${head}1 0 0\n`, 2, /claims 99999 ports/],
    ['no ports', 'a.s0p', `${head}1 0 0\n`, 2, /claims 0 ports/],
    ['an option line behind data', 'a.s1p', `1 0 0\n${head}`, 2, /behind data/],
    ['H parameters of three ports', 'a.s3p', '# Hz H RI R 1\n1 1 2 3 4 5 6\n', 2, /do not exist/],
    ['two references for four ports', 'a.s4p', '# Hz S RI R 50 75\n1 1 2\n', 2, /2 references for 4/],
    ['a noise row cut short', 'a.s2p', `${head}5 1 0 1 0 1 0 1 0\n1 1 1 1 1\n2 1 1 1\n`, 4, /5 numbers/],
    ['a binary file', 'a.s2p', 'PK\u0003\u0004\u0000\u0000', 1, /not text/],
    ['a keyword without [Version]', 'a.s2p', '[Number of Ports] 2\n', 1, /before \[Version\]/],
  ])('%s', (_, name, text, line, reason) => {
    const error = refusal(name, text);
    expect(error.reason).toMatch(reason);
    expect(error.line).toBe(line);
    expect(error.mend).not.toBe('');
    expect(error.message).toContain(name);
  });
  it('UTF-16 text', () => {
    const bytes = Uint8Array.of(0xff, 0xfe, 35, 0, 10, 0);
    expect(() => readTouchstone('a.s1p', bytes)).toThrow(/UTF-16/);
  });
});

describe('references of field solvers, written behind every point', () => {
  const text = [
    '# GHZ S RI',
    '1 0.1 0 0.9 0 0.9 0 0.1 0',
    '! Gamma ! 0.1 0.2 0.1 0.2',
    '! Port Impedance40 5 60 -5',
    '2 0.1 0 0.9 0 0.9 0 0.1 0',
    '! Gamma ! 0.1 0.2 0.1 0.2',
    '! Port Impedance 41 5',
    '!  61 -5',
  ].join('\n');
  it('are kept for every point, wrapped or not, and named', () => {
    const file = read('a.s2p', text);
    expect([...file.perPointReferenceOhm!]).toEqual([40, 5, 60, -5, 41, 5, 61, -5]);
    expect(file.complexReference).toBe(true);
    expect(file.warnings.map((w) => w.text).join()).toMatch(/differ from the reference/);
  });
  it('must be interpreted before the network is used, and power and pseudo waves differ', () => {
    const file = read('a.s2p', text);
    expect(() => networkOfFile(file)).toThrow(/power or pseudo waves/);
    const power = networkOfFile(file, 'power');
    const pseudo = networkOfFile(file, 'pseudo');
    expect([...power.referenceOhm]).toEqual([50, 0, 50, 0]);
    expect(Math.abs(power.s[0]! - pseudo.s[0]!) + Math.abs(power.s[1]! - pseudo.s[1]!)).toBeGreaterThan(0.01);
  });
  it('that equal the option line change nothing', () => {
    const file = read('a.s1p', '# GHZ S RI R 50\n1 0.1 0\n! Port Impedance 50 0\n');
    expect(file.perPointReferenceOhm).toBeUndefined();
    expect(networkOfFile(file)).toBe(file.network);
  });
  it('that are missing at some points are named and not used', () => {
    const file = read('a.s1p', '# GHZ S RI R 50\n1 0.1 0\n! Port Impedance 40 0\n2 0.1 0\n');
    expect(file.perPointReferenceOhm).toBeUndefined();
    expect(file.warnings[0]!.text).toMatch(/1 of 2 points/);
  });
});

describe('reading in chunks', () => {
  it('gives the same whatever the size of the chunks', () => {
    const text =
      '! head\r\n# MHz S DB R 42.5\r\n1 -3 10 -20 30 -20 30 -3 10 ! end\r\n2 -3.5 11 -21 31 -21 31 -3.5 11\r\n';
    const whole = read('a.s2p', text);
    for (const size of [1, 2, 3, 7, 16, 64]) {
      const bytes = bytesOf(text);
      const reader = createTouchstoneReader('a.s2p');
      for (let k = 0; k < bytes.length; k += size) reader.push(bytes.slice(k, k + size));
      expect(reader.finish()).toEqual(whole);
    }
  });
});
