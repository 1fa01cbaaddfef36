/** Channel documents and Touchstone texts that several specs use. */
export const line = {
  kind: 'line',
  z0Ohm: 50,
  lengthM: '50 mm',
  effectivePermittivity: 3.6,
  lossSqrtDbPerM: 4,
  lossLinearDbPerM: 2,
};

export const limit = {
  title: 'Own insertion loss',
  quantity: 'insertion-loss',
  sense: 'max',
  segments: [{ fromHz: '100 MHz', toHz: '5 GHz', formula: '1 + 0.5*f' }],
  status: 'own',
};

export function channelDocument(changes: Record<string, unknown> = {}): Record<string, unknown> {
  return {
    format: 'tollgate.channel/1',
    name: 'Lane 0',
    signaling: 'single-ended',
    symbolRateBd: '10 GBd',
    elements: [line],
    limits: [limit],
    ...changes,
  };
}

/** A lossy two-port written by hand: |S21| falls by 0.1 a GHz, matched. */
export function twoPortText(lastGhz = 20): string {
  const rows = Array.from({ length: lastGhz * 10 }, (_unused, i) => {
    const f = (i + 1) / 10;
    const through = 10 ** ((-0.1 * f) / 20);
    const angle = -36 * f;
    return `${f} 0.01 0 ${through} ${angle} ${through} ${angle} 0.01 0`;
  });
  return ['! written for a test', '# GHz S MA R 50', ...rows, ''].join('\n');
}

/** Matched and uncoupled, losing 0.8 dB x sqrt(f in GHz), 0.5 ns long; through pairs 1-2 and 3-4 for four ports. */
export function lossyPart(ports: 2 | 4, fromGhz: number, toGhz: number): string {
  const rows = Array.from({ length: 1001 }, (_unused, k) => {
    const f = fromGhz + ((toGhz - fromGhz) * k) / 1000;
    const size = 10 ** ((-0.8 * Math.sqrt(f)) / 20);
    const turn = -2 * Math.PI * f * 0.5;
    const s = `${size * Math.cos(turn)} ${size * Math.sin(turn)}`;
    if (ports === 2) return `${f} 0 0 ${s} ${s} 0 0`;
    return `${f} ${[`0 0 ${s} 0 0 0 0`, `${s} 0 0 0 0 0 0`, `0 0 0 0 0 0 ${s}`, `0 0 0 0 ${s} 0 0`].join('\n')}`;
  });
  return `# GHz S RI R 50\n${rows.join('\n')}\n`;
}
