import { patched, withStep, type Step } from './undo-list';

const first = { name: 'a', list: [1, 2, 3] };
const second = { name: 'b', list: [1, 2, 3] };
const third = { name: 'b', list: [1, 3] };

describe('the list of steps back', () => {
  it('goes back and forth over an edit', () => {
    const [step] = withStep([], second, third, '', 0);
    expect(patched(third, step!.back)).toEqual(second);
    expect(patched(second, step!.forth)).toEqual(third);
  });

  it('makes one step of quick typing in one field', () => {
    let steps: readonly Step[] = withStep([], { x: 1 }, { x: 12 }, 'x', 0);
    steps = withStep(steps, { x: 12 }, { x: 123 }, 'x', 400);
    expect(steps).toHaveLength(1);
    expect(patched({ x: 123 }, steps[0]!.back)).toEqual({ x: 1 });
    expect(patched({ x: 1 }, steps[0]!.forth)).toEqual({ x: 123 });
  });

  it('keeps edits of different fields, and slow ones, apart', () => {
    const one = withStep([], { x: 1, y: 1 }, { x: 2, y: 1 }, 'x', 0);
    expect(withStep(one, { x: 2, y: 1 }, { x: 2, y: 2 }, 'y', 100)).toHaveLength(2);
    expect(withStep(one, { x: 2, y: 1 }, { x: 3, y: 1 }, 'x', 5000)).toHaveLength(2);
  });

  it('refuses a step whose ground another person has changed', () => {
    const [step] = withStep([], first, second, '', 0);
    expect(patched({ name: 'c', list: [1, 2, 3] }, step!.back)).toBeUndefined();
  });

  it('leaves the document it patches as it was', () => {
    const [step] = withStep([], first, second, '', 0);
    const document = { name: 'b', list: [1, 2, 3] };
    patched(document, step!.back);
    expect(document).toEqual(second);
  });
});
