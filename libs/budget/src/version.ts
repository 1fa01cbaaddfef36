/** Version of the calculation; part of every fingerprint, so it changes with anything that can change a number. */
export const engineVersion: string = '0.2.0';
