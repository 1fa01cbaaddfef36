/** Text of a comment or keyword: UTF-8 where the bytes are that, else Latin-1. At most `limit` bytes are looked at. */
export function decodeText(bytes: Uint8Array, start: number, end: number, limit = 2000): string {
  const stop = Math.min(end, start + limit);
  let plain = '';
  let utf8 = '';
  let valid = true;
  for (let k = start; k < stop; k++) plain += String.fromCharCode(bytes[k]!);
  for (let k = start; k < stop && valid;) {
    const lead = bytes[k]!;
    const more =
      lead < 0x80
        ? 0
        : lead >= 0xc2 && lead < 0xe0
          ? 1
          : (lead & 0xf0) === 0xe0
            ? 2
            : (lead & 0xf8) === 0xf0
              ? 3
              : -1;
    if (more < 0 || k + more >= end) {
      valid = false;
      break;
    }
    let code = more === 0 ? lead : lead & (0x3f >> more);
    for (let n = 1; n <= more; n++) {
      const next = bytes[k + n]!;
      if ((next & 0xc0) !== 0x80) valid = false;
      code = (code << 6) | (next & 0x3f);
    }
    if (code > 0x10ffff || (code >= 0xd800 && code < 0xe000)) valid = false;
    if (valid) utf8 += String.fromCodePoint(code);
    k += more + 1;
  }
  return valid ? utf8 : plain;
}
