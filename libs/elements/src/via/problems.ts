import type { Signaling, Stackup } from '@tollgate/contracts';
import { isCopper } from '../trace/layers';
import { ElementError, type ElementProblem } from '../types';
import { millimetres, placeBarrel, type Barrel, type Via } from './barrel';
import { legsOf } from './cross-section';
import { crossedCopper, isPlane, padOn, returnDiameterM, sizeOn } from './sizes';

/** What can be said of a via before it is built: its layers, its sizes, and what stands too close. Paths are inside the element. */
export function viaProblems(via: Via, signaling: Signaling, stackup?: Stackup): ElementProblem[] {
  const problems = [...pitchProblems(via, signaling), ...nameProblems(via, stackup)];
  let barrel: Barrel;
  try {
    barrel = placeBarrel(via, stackup);
  } catch (error) {
    if (error instanceof ElementError) return [...problems, error.problem];
    throw error;
  }
  return [
    ...problems,
    ...padProblems(via, barrel),
    ...antipadProblems(via, barrel),
    ...returnViaProblems(via, barrel),
  ];
}

function problem(path: string, message: string, mend: string): ElementProblem {
  return { path, message, mend };
}

/** The path of a size, and of one layer's where sizes are given by layer. */
function sizePath(via: Via, field: 'padM' | 'antipadM', layer: string): string {
  return typeof via[field] === 'number' ? field : `${field}.${layer}`;
}

function pitchProblems({ pitchM, drillM }: Via, signaling: Signaling): ElementProblem[] {
  if (signaling === 'differential' && pitchM === undefined) {
    return [
      problem(
        'pitchM',
        'A via of a differential channel is a pair, and has no pitch.',
        'Give pitchM, from axis to axis.',
      ),
    ];
  }
  if (signaling === 'single-ended' && pitchM !== undefined) {
    return [
      problem(
        'pitchM',
        `The pitch of ${millimetres(pitchM)} belongs to a pair; the channel is single-ended.`,
        'Leave pitchM out, or change the signaling.',
      ),
    ];
  }
  if (pitchM !== undefined && pitchM <= drillM) {
    return [
      problem(
        'pitchM',
        `At a pitch of ${millimetres(pitchM)} the two drills of ${millimetres(drillM)} meet.`,
        'Give a pitch larger than the drill.',
      ),
    ];
  }
  return [];
}

/** Sizes for layers that are nowhere would otherwise be lost. */
function nameProblems(via: Via, stackup?: Stackup): ElementProblem[] {
  const names = new Set((stackup?.layers ?? []).filter(isCopper).map((layer) => layer.name));
  return (['padM', 'antipadM'] as const).flatMap((field) => {
    const size = via[field];
    if (typeof size === 'number') return [];
    return Object.keys(size)
      .filter((name) => !names.has(name))
      .map((name) =>
        problem(
          `${field}.${name}`,
          `The stackup has no copper layer ${name}; it has ${[...names].join(', ') || 'none'}.`,
          'Name copper layers of the stackup.',
        ),
      );
  });
}

function padProblems(via: Via, barrel: Barrel): ElementProblem[] {
  const found: ElementProblem[] = [];
  for (const placed of crossedCopper(barrel)) {
    const padM = padOn(via, placed);
    if (padM === 0) continue;
    const { name } = placed.layer;
    const path = sizePath(via, 'padM', name);
    if (padM <= via.drillM) {
      found.push(
        problem(
          path,
          `The pad of ${millimetres(padM)} on ${name} is not larger than the drill of ${millimetres(via.drillM)}.`,
          'Give a pad larger than the drill, or 0 where it is removed.',
        ),
      );
    }
    if (via.pitchM !== undefined && via.pitchM > via.drillM && padM >= via.pitchM) {
      found.push(
        problem(
          path,
          `The two pads of ${millimetres(padM)} on ${name} meet at a pitch of ${millimetres(via.pitchM)}.`,
          'Give smaller pads or a larger pitch.',
        ),
      );
    }
  }
  return oncePerPath(found);
}

function antipadProblems(via: Via, barrel: Barrel): ElementProblem[] {
  const found: ElementProblem[] = [];
  for (const placed of crossedCopper(barrel)) {
    const plane = isPlane(placed);
    if (!plane && via.returnVias?.length) continue;
    const { name } = placed.layer;
    const outerM = plane ? sizeOn(via.antipadM, name) : returnDiameterM(via, barrel, placed);
    const widest = Math.max(via.drillM, padOn(via, placed));
    if (outerM !== undefined && outerM > widest) continue;
    if (plane) found.push(planeProblem(via, name, outerM, widest));
    else if (outerM === undefined) found.push(nothingToReturnOn(barrel));
    else if (widest > via.drillM) found.push(widePad(via, name, widest, outerM));
    // A drill that fills the antipads is told of at the planes; without planes, here.
    else if (!crossedCopper(barrel).some(isPlane)) found.push(planeProblem(via, name, outerM, widest));
  }
  return oncePerPath(found);
}

function planeProblem(via: Via, name: string, antipadM: number | undefined, widest: number): ElementProblem {
  const path = sizePath(via, 'antipadM', name);
  if (antipadM === undefined) {
    return problem(path, `The barrel crosses ${name}, which has no antipad.`, `Give the antipad of ${name}.`);
  }
  const what = widest > via.drillM ? 'pad' : 'drill';
  return problem(
    path,
    `The antipad of ${millimetres(antipadM)} on ${name} is not larger than the ${what} of ${millimetres(widest)}: the barrel would touch the copper.`,
    `Give an antipad larger than the ${what}${what === 'pad' ? ', or a pad of 0 on this layer' : ''}.`,
  );
}

function widePad(via: Via, name: string, padM: number, outerM: number): ElementProblem {
  return problem(
    sizePath(via, 'padM', name),
    `The pad of ${millimetres(padM)} on ${name} is not smaller than the antipads around it (${millimetres(outerM)}).`,
    'Give a smaller pad, larger antipads, or name the return vias.',
  );
}

function nothingToReturnOn(barrel: Barrel): ElementProblem {
  const copper = crossedCopper(barrel)
    .map(({ layer }) => layer.name)
    .join(', ');
  return problem(
    'antipadM',
    `The barrel crosses no plane (only ${copper}), no clearance is given there, and no return vias are named: current has nothing to return on.`,
    'Name the return vias, give antipadM, or give a layer the role plane.',
  );
}

function returnViaProblems(via: Via, barrel: Barrel): ElementProblem[] {
  const returns = via.returnVias ?? [];
  const found: ElementProblem[] = [];
  const copper = crossedCopper(barrel);
  const widestPadM = Math.max(0, ...copper.map((placed) => padOn(via, placed)));
  const planes = copper.filter(isPlane);
  returns.forEach(([xM, yM], i) => {
    const where = `The return via at (${millimetres(xM)}, ${millimetres(yM)})`;
    const path = `returnVias[${i}]`;
    const distanceM = Math.min(...legsOf(via).map(([x, y]) => Math.hypot(xM - x, yM - y)));
    const twin = returns.findIndex(([x, y], k) => k < i && Math.hypot(x - xM, y - yM) <= via.drillM);
    if (twin >= 0) {
      found.push(
        problem(path, `${where} meets returnVias[${twin}].`, 'Move it, or leave one of the two out.'),
      );
    }
    const edgeM = distanceM - via.drillM / 2;
    const inside = planes.find(({ layer }) => edgeM < (sizeOn(via.antipadM, layer.name) ?? 0) / 2);
    if (edgeM <= Math.max(via.drillM, widestPadM) / 2) {
      found.push(problem(path, `${where} meets the via or its pad.`, 'Move it further out.'));
    } else if (inside) {
      const antipadM = sizeOn(via.antipadM, inside.layer.name)!;
      found.push(
        problem(
          path,
          `${where} reaches into the antipad of ${millimetres(antipadM)} on ${inside.layer.name}, so it does not reach the plane.`,
          'Move it further out, or give a smaller antipad.',
        ),
      );
    }
  });
  return found;
}

/** One size for all layers is told of once. */
function oncePerPath(problems: ElementProblem[]): ElementProblem[] {
  return problems.filter((each, i) => problems.findIndex((other) => other.path === each.path) === i);
}
