/** What is held and what follows while a number varies, in words for `check` and the summary. */
import { showValue } from '../figures/display.ts';
import { inputDefinition } from './inputs.ts';
import { tailPairs } from './read-tail.ts';
import { wingSizes } from './read-wing.ts';
import type { Axis, CgKind, Held, LoadingItem, ShowSystem } from './study.ts';
import type { Choices } from './varied-paths.ts';

interface Dependants {
  readonly held: readonly string[];
  /** What else stays or rides along, in words. */
  readonly also: readonly string[];
  readonly follows: readonly string[];
}

/**
 * One entry for each varied number that is one of several that settle a shape.
 * @param sized path of the number that the study's sizing chooses
 */
export function describeHeld(
  axes: readonly Axis[],
  choices: Choices,
  inputs: ReadonlyMap<string, number>,
  show: ShowSystem,
  sized?: string,
): Held[] {
  const varied = new Set(axes.flatMap((axis) => axis.paths));
  const words = (path: string) => {
    if (varied.has(path)) return `${path} (varied as well)`;
    if (path === sized) return `${path} (chosen in each combination)`;
    const value = inputs.get(path);
    if (value === undefined) return path;
    return `${path} (${showValue(value, inputDefinition(path).dimension, show)})`;
  };
  return [...varied].flatMap((path) => {
    const dependants = dependantsOf(path, choices);
    if (!dependants) return [];
    const others = dependants.held.filter((other) => other !== path);
    return [{ varied: path, held: [...others.map(words), ...dependants.also], follows: dependants.follows }];
  });
}

function dependantsOf(path: string, choices: Choices): Dependants | undefined {
  if (path.startsWith('tail.')) return tailDependants(path, choices);
  if (/^wing\.(root_leading_edge|(panels\[\d+\]\.)?sweep_)/.test(path)) return placeDependants(path, choices);
  if (/^wing\.(area|span|aspect_ratio|root_chord|taper)$/.test(path)) return sizeDependants(path, choices);
  if (/^wing\.panels\[\d+\]\.(width|span_fraction|taper)$/.test(path)) return sizeDependants(path, choices);
  return undefined;
}

const tailGiven = ({ tail }: Choices) => [`tail.${tail.size}`, `tail.${tail.place}`, `tail.${tail.planform}`];

/** The number of a pair that the study does not give. */
function other(pair: readonly string[], given: string): string {
  return `tail.${pair.find((key) => key !== given)!}`;
}

/** What of the tail follows when its size in m² changes, or only its measure against the wing. */
function tailSizeFollows({ tail, loading }: Choices, areaChanges: boolean): string[] {
  const size = other(tailPairs.size, tail.size);
  if (!areaChanges) return [size];
  return [size, other(tailPairs.planform, tail.planform), ...massesFollow('tail', loading)];
}

/** Masses that follow the area of wing or tail, in words. */
function massesFollow(carrier: 'wing' | 'tail', loading: Choices['loading']): string[] {
  const items = perArea(loading).filter((item) => item.carriedBy === carrier);
  return items.map((item) => `mass of loading.items.${item.name}`);
}

function perArea(loading: Choices['loading']): LoadingItem[] {
  return (loading?.items ?? []).filter((item) => item.massAs === 'mass_per_area');
}

function tailDependants(path: string, choices: Choices): Dependants | undefined {
  const { tail } = choices;
  const held = tailGiven(choices);
  const byVolume = tail.size === 'volume';
  const also: string[] = [];
  if (path === `tail.${tail.size}`) return { held, also, follows: tailSizeFollows(choices, true) };
  if (path === `tail.${tail.planform}`)
    return { held, also, follows: [other(tailPairs.planform, tail.planform)] };
  if (path !== `tail.${tail.place}`) return undefined;
  return { held, also, follows: [other(tailPairs.place, tail.place), ...tailSizeFollows(choices, byVolume)] };
}

/** The wing moves or slides along, and its sizes stay. */
/** Moving the wing does not slide it along a fixed body: the stations of the body go with it. */
const bodyRides = 'a body’s shape ahead of and over the wing (it rides with the wing)';

function placeDependants(path: string, choices: Choices): Dependants {
  const { tail } = choices;
  const armFollows = ['tail.arm', ...tailSizeFollows(choices, tail.size === 'volume')];
  return {
    held: [...choices.wing.given, ...tailGiven(choices)],
    also: [...cgWords(choices), ...(path === 'wing.root_leading_edge' ? [bodyRides] : [])],
    follows: [
      'station of the mean aerodynamic chord',
      ...(tail.place === 'arm' ? ['tail.station'] : armFollows),
    ],
  };
}

function sizeDependants(path: string, choices: Choices): Dependants {
  const { wing, tail } = choices;
  const isSize = (wingSizes as readonly string[]).includes(path);
  const isWidth = path.endsWith('.width');
  const spanStays = wing.form === 'panels' && wing.panelWidth === 'width' && !isWidth;
  // area, span and aspect ratio settle each other: a taper then moves only the root chord
  const chordOnly = !isSize && !isWidth && !wing.given.includes('wing.root_chord');
  const free = wingSizes.filter((size) => !wing.given.includes(size) && !(spanStays && size === 'wing.span'));
  const areaChanges = path === 'wing.area' || (!chordOnly && free.includes('wing.area'));
  return {
    held: [...wing.given, ...tailGiven(choices)],
    also: cgWords(choices),
    follows: [
      ...(chordOnly ? ['wing.root_chord'] : free),
      'mean aerodynamic chord',
      ...tailSizeFollows(choices, tail.size === 'volume'),
      other(tailPairs.place, tail.place),
      ...(areaChanges ? massesFollow('wing', choices.loading) : []),
    ],
  };
}

function cgWords({ cg, loading }: Choices): string[] {
  if (loading) {
    const carriers = new Set(loading.items.map((item) => item.carriedBy).filter((by) => by !== 'station'));
    const riding = carriers.size > 0 ? ` (items carried by ${[...carriers].join(' and ')} ride along)` : '';
    const held = perArea(loading).length > 0 ? 'masses, masses per area' : 'masses';
    return [`the ${held} and stations of the loading${riding}`];
  }
  const words = (end: string, kind: CgKind) => {
    if (kind === 'percent_mac') return `cg.${end} in % MAC (it rides with the wing)`;
    if (kind === 'station') return `cg.${end} as a station (it stays where it is)`;
    return `cg.${end} as a distance behind the MAC’s leading edge (it rides with the wing)`;
  };
  return [words('forward', cg.forward), words('aft', cg.aft)];
}
