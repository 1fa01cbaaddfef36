/** Every limit on size, in one place: schemas, forms and the server's readers take them from here. */
export const bounds = {
  gridPoints: { min: 2, max: 20_001 },
  elements: { min: 1, max: 500 },
  pathVertices: 1_000,
  outlineCorners: 500,
  limits: 50,
  segments: 50,
  maskPoints: 1_000,
  formulaCharacters: 500,
  textCharacters: 200,
  notesCharacters: 2_000,
  documentBytes: 2 * 1024 * 1024,
  uploadBytes: 64 * 1024 * 1024,
  stackupLayers: 100,
  circuitElements: 50,
  ports: 64,
  passwordCharacters: { min: 12, max: 200 },
} as const;
