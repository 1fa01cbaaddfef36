import type { FrequencyUnit, NumberFormat, OptionLine, Parameter } from './touchstone-file';

/** A reason and a mend; the caller knows file and line. */
export interface Refusal {
  readonly reason: string;
  readonly mend: string;
}

const units: Readonly<Record<string, FrequencyUnit>> = { HZ: 'Hz', KHZ: 'kHz', MHZ: 'MHz', GHZ: 'GHz' };
const parameters: readonly string[] = ['S', 'Y', 'Z', 'H', 'G'];
const formats: readonly string[] = ['MA', 'DB', 'RI'];

/** Powers of ten of the frequency units. */
export const unitPower: Readonly<Record<FrequencyUnit, number>> = { Hz: 0, kHz: 3, MHz: 6, GHz: 9 };

export const defaultOption: OptionLine = {
  unit: 'GHz',
  parameter: 'S',
  format: 'MA',
  referenceOhm: [[50, 0]],
  referenceStated: false,
};

/** One reference: `50`, or complex as some programs write it, `(50+50j)`, `50-12.5i`. */
export function parseImpedance(token: string): readonly [number, number] | null {
  const number = '[+-]?(?:\\d+\\.?\\d*|\\.\\d+)(?:[eEdD][+-]?\\d+)?';
  const match = new RegExp(
    `^\\(?(${number})(?:([+-](?:\\d+\\.?\\d*|\\.\\d+)(?:[eEdD][+-]?\\d+)?)[ijIJ])?\\)?$`,
  ).exec(token);
  if (!match) return null;
  const value = (text: string): number => Number(text.replace(/[dD]/, 'e'));
  return [value(match[1]!), match[2] === undefined ? 0 : value(match[2])];
}

/**
 * The option line, `# <unit> <parameter> <format> R <ohm>` in any order and case (Touchstone 1.1, "option line").
 * @param text what follows the `#`, comment removed
 */
export function parseOptionLine(text: string): OptionLine | Refusal {
  let unit: FrequencyUnit | undefined;
  let parameter: Parameter | undefined;
  let format: NumberFormat | undefined;
  const referenceOhm: (readonly [number, number])[] = [];
  const tokens = text
    .replace(/\u00a0/g, ' ')
    .split(/\s+/)
    .filter(Boolean);
  const twice = (what: string): Refusal => ({
    reason: `The option line names the ${what} twice.`,
    mend: 'Keep one of them.',
  });
  for (let k = 0; k < tokens.length; k++) {
    const token = tokens[k]!;
    const upper = token.toUpperCase();
    if (units[upper]) {
      if (unit) return twice('frequency unit');
      unit = units[upper];
    } else if (parameters.includes(upper)) {
      if (parameter) return twice('parameter');
      parameter = upper as Parameter;
    } else if (formats.includes(upper)) {
      if (format) return twice('number format');
      format = upper as NumberFormat;
    } else if (upper === 'R') {
      if (referenceOhm.length) return twice('reference');
      for (let z = tokens[k + 1]; z !== undefined; z = tokens[k + 1]) {
        const impedance = parseImpedance(z);
        if (!impedance) break;
        referenceOhm.push(impedance);
        k++;
      }
      if (!referenceOhm.length) {
        return {
          reason: `The option line has an R without a value${tokens[k + 1] ? ` ("${tokens[k + 1]}")` : ''}.`,
          mend: 'Write the reference in ohm behind R, such as R 50.',
        };
      }
    } else {
      return {
        reason: `The option line holds "${token}", which is no unit, parameter, format or reference.`,
        mend: 'Use Hz, kHz, MHz or GHz; S, Y, Z, H or G; MA, DB or RI; and R with ohms.',
      };
    }
  }
  const bad = referenceOhm.find(([re]) => !(re > 0) || !Number.isFinite(re));
  if (bad) {
    return {
      reason: `The reference ${bad[0]} ohm of the option line is not above zero.`,
      mend: 'Give a reference with a positive real part.',
    };
  }
  return {
    unit: unit ?? defaultOption.unit,
    parameter: parameter ?? defaultOption.parameter,
    format: format ?? defaultOption.format,
    referenceOhm: referenceOhm.length ? referenceOhm : defaultOption.referenceOhm,
    referenceStated: referenceOhm.length > 0,
  };
}
