import { ComponentHarness } from '@angular/cdk/testing';

/** What a person sees of a verdict: the shape of its mark, and its words. */
export class VerdictHarness extends ComponentHarness {
  static readonly hostSelector = 'tg-verdict';

  async words(): Promise<string> {
    return (await this.host()).text();
  }

  /** What the mark is drawn of: the outline of each path, and `ring` for a circle. */
  async shapes(): Promise<string[]> {
    const shapes = await this.locatorForAll('circle', 'path')();
    return Promise.all(shapes.map(async (shape) => (await shape.getAttribute('d')) ?? 'ring'));
  }

  async isDashed(): Promise<boolean> {
    return (await this.locatorForOptional('[stroke-dasharray]')()) !== null;
  }
}
