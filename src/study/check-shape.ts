/** Whether the aeroplane hangs together: at its fixed values, and wherever a single axis breaks it. */

import type { Baseline } from './hold.ts';
import { findInputDefinition, inputDefinition } from './inputs.ts';
import { isFault, type Quantity, rangeFault } from './quantities.ts';
import { fewestStations } from './read-body.ts';
import { type CarrierAreas, impossibleCase } from './read-loading.ts';
import type { PlacedAxis } from './read-vary.ts';
import type { Reading } from './reading.ts';
import type { Span } from './source.ts';
import type { BodyChoices, CgKind } from './study.ts';
import type { Choices } from './varied-paths.ts';

const tailOrder =
  'Screening computes a tail behind the wing only: give a longer arm or a station further aft.';

/** Sizes that follow from the given ones must be possible too. */
export function checkDerivedSizes(choices: Choices, baseline: Baseline, reading: Reading): void {
  if (baseline.tail['tail.arm'] <= 0) return;
  const derived: [string, number, string][] = [];
  for (const [path, value] of Object.entries(baseline.wing.sizes))
    derived.push([path, value, choices.wing.given[0]!]);
  for (const [path, value] of Object.entries(baseline.tail)) {
    if (path !== 'tail.station' && path !== 'tail.arm')
      derived.push([path, value, `tail.${choices.tail.size}`]);
  }
  for (const [path, value, given] of derived) {
    if (reading.inputs.has(path) || !Number.isFinite(value)) continue;
    const quantity: Quantity = { value, factor: 1, unit: '', si: value };
    const fault = rangeFault(quantity, inputDefinition(path), path);
    const span = reading.spans.get(given);
    if (!fault || !span || !isFault(fault)) continue;
    reading.faults.add(
      'OUT_OF_RANGE',
      span,
      `From the numbers given it follows that ${fault.found}`,
      'Check the numbers given, and their units.',
    );
  }
}

const metres = (value: number) => `${Number(value.toFixed(3))} m`;

/** The tail's place against wing and body at the fixed values. */
export function checkTailPlace(
  choices: Choices,
  body: BodyChoices | undefined,
  { wing, tail }: Baseline,
  reading: Reading,
): void {
  const span = reading.spans.get(`tail.${choices.tail.place}`);
  const station = tail['tail.station'];
  if (!span || !Number.isFinite(station)) return;
  if (tail['tail.arm'] <= 0 || station <= wing.rootTrailingEdge) {
    const found = `The tail’s quarter-MAC lies at station ${metres(station)}, not aft of the wing’s root trailing edge at ${metres(wing.rootTrailingEdge)}.`;
    reading.faults.add('TAIL_AHEAD_OF_WING', span, found, tailOrder);
  }
  if (!body || body.boom || body.stations < fewestStations) return;
  const end = reading.inputs.get(`body.stations[${body.stations}].at`);
  if (end === undefined || !(station > end)) return;
  const found = `The tail’s quarter-MAC lies at station ${metres(station)}, beyond the end of the body at ${metres(end)}.`;
  reading.faults.add(
    'TAIL_BEYOND_BODY',
    span,
    found,
    'Lengthen the body, or add boom: {width: …, depth: …}.',
  );
}

/** The place of every value of one axis, with the values its numbers take there. */
function* rowsOf(
  axis: PlacedAxis,
  paths: readonly string[],
): Generator<{ span: Span; at: ReadonlyMap<string, number> }> {
  const columns = paths.map((path) => axis.paths.indexOf(path));
  const lead = Math.max(0, columns.find((column) => column >= 0) ?? 0);
  for (let i = 0; i < axis.values[0]!.length; i++) {
    const at = new Map<string, number>();
    columns.forEach((column, k) => {
      if (column >= 0) at.set(paths[k]!, axis.values[column]![i]!);
    });
    yield { span: axis.placeOf(lead, i), at };
  }
}

/** Varied values that break the aeroplane whatever the other axes do. */
export function checkVariedShape(
  axes: readonly PlacedAxis[],
  choices: Choices,
  body: BodyChoices | undefined,
  baseline: Baseline,
  reading: Reading,
): void {
  const axisOf = (path: string) => axes.find((axis) => axis.paths.includes(path));
  checkVariedStations(axes, body, reading);
  checkVariedFractions(axes, choices, reading);
  checkVariedTail(axes, baseline, reading);
  checkVariedCounts(axes, reading);
  checkVariedFlaps(axes, reading);
  checkVariedLoading(axes, choices, baseline, reading);
  checkVariedBodyEnd(axes, body, baseline, reading);
  checkVariedCg(axisOf('cg.forward'), axisOf('cg.aft'), choices, baseline, reading);
}

function checkVariedTail(axes: readonly PlacedAxis[], { wing }: Baseline, reading: Reading): void {
  const limits = { 'tail.arm': 0, 'tail.station': wing.quarterMac };
  for (const [path, limit] of Object.entries(limits)) {
    const axis = axes.find((one) => one.paths.includes(path));
    if (!axis) continue;
    for (const { span, at } of rowsOf(axis, [path])) {
      if (!(at.get(path)! <= limit)) continue;
      const found = `With this value of ${path} the tail does not lie aft of the wing’s quarter-MAC.`;
      reading.faults.add('TAIL_AHEAD_OF_WING', span, found, tailOrder);
      break;
    }
  }
}

/** The last station keeps its distance from the tail, so each of its values must reach the baseline's tail. */
function checkVariedBodyEnd(
  axes: readonly PlacedAxis[],
  body: BodyChoices | undefined,
  { tail }: Baseline,
  reading: Reading,
): void {
  if (!body || body.boom) return;
  const path = `body.stations[${body.stations}].at`;
  const axis = axes.find((one) => one.paths.includes(path));
  if (!axis) return;
  for (const { span, at } of rowsOf(axis, [path])) {
    if (!(at.get(path)! < tail['tail.station'])) continue;
    reading.faults.add(
      'TAIL_BEYOND_BODY',
      span,
      `With this value the body ends ahead of the tail’s quarter-MAC at ${metres(tail['tail.station'])}.`,
      'Leave the value out, or add boom: {width: …, depth: …}.',
    );
    break;
  }
}

function checkVariedStations(
  axes: readonly PlacedAxis[],
  body: BodyChoices | undefined,
  reading: Reading,
): void {
  const path = (number: number) => `body.stations[${number}].at`;
  const count = body?.stations ?? 0;
  for (let number = 2; number <= count; number++) {
    const pair = [path(number - 1), path(number)];
    const [before, after] = pair.map((one) => axes.find((axis) => axis.paths.includes(one)));
    // two stations on two axes may cross in some combinations only: those are flagged when evaluated
    if (!before === !after && before !== after) continue;
    const axis = before ?? after;
    if (!axis) continue;
    for (const { span, at } of rowsOf(axis, pair)) {
      const [first, second] = pair.map((one) => at.get(one) ?? reading.inputs.get(one) ?? Number.NaN);
      if (!(second! <= first!)) continue;
      reading.faults.add(
        'STATIONS_NOT_ASCENDING',
        span,
        `With this value body.stations[${number}] does not lie aft of the station before it.`,
        'Leave the value out, or vary both stations side by side.',
      );
      break;
    }
  }
}

function checkVariedCounts(axes: readonly PlacedAxis[], reading: Reading): void {
  for (const axis of axes) {
    for (const path of axis.paths.filter((one) => findInputDefinition(one)?.dimension === 'count')) {
      for (const { span, at } of rowsOf(axis, [path])) {
        if (Number.isInteger(at.get(path))) continue;
        const found = `This axis gives ${path} values that are no whole numbers.`;
        reading.faults.add('OUT_OF_RANGE', span, found, 'Count in whole numbers.');
        break;
      }
    }
  }
}

/** Flaps whose inboard end passes the outboard one, whatever the other axes do. */
function checkVariedFlaps(axes: readonly PlacedAxis[], reading: Reading): void {
  const ends = ['wing.flaps.span_from', 'wing.flaps.span_to'];
  const [from, to] = ends.map((path) => axes.find((axis) => axis.paths.includes(path)));
  const axis = from ?? to;
  if (!axis || (from && to && from !== to)) return;
  for (const { span, at } of rowsOf(axis, ends)) {
    const [inboard, outboard] = ends.map((path) => at.get(path) ?? reading.inputs.get(path) ?? Number.NaN);
    if (!(inboard! >= outboard!)) continue;
    const found = 'With this value wing.flaps.span_from does not lie inboard of wing.flaps.span_to.';
    reading.faults.add('BAND_REVERSED', span, found, 'Leave the value out, or vary both ends side by side.');
    return;
  }
}

/** Areas of wing and tail at the fixed values [m²]. */
export function carrierAreas({ wing, tail }: Baseline): CarrierAreas {
  return { wing: wing.sizes['wing.area'], tail: tail['tail.area'] };
}

/** Areas of wing and tail that no axis can change; NaN for one that may be different elsewhere. */
function steadyAreas(axes: readonly PlacedAxis[], baseline: Baseline): CarrierAreas {
  const varies = (surface: string) =>
    axes.some((axis) => axis.paths.some((path) => path.startsWith(`${surface}.`)));
  const { wing, tail } = carrierAreas(baseline);
  const wingVaries = varies('wing');
  // a tail's area may follow from the wing's sizes and place
  return {
    wing: wingVaries ? Number.NaN : wing,
    tail: wingVaries || varies('tail') ? Number.NaN : tail,
  };
}

/** A loading case that one axis alone makes heavier than the greatest mass. */
function checkVariedLoading(
  axes: readonly PlacedAxis[],
  { loading }: Choices,
  baseline: Baseline,
  reading: Reading,
): void {
  if (!loading) return;
  const isMass = (path: string) => /^loading\.(at_most$|.*\.mass(_per_area)?$)/.test(path);
  const areas = steadyAreas(axes, baseline);
  for (const axis of axes.filter((one) => one.paths.some(isMass))) {
    for (const { span, at } of rowsOf(axis, axis.paths.filter(isMass))) {
      const heavy = impossibleCase(loading, areas, (path) => at.get(path) ?? reading.inputs.get(path));
      if (!heavy) continue;
      const found = `With this value ${heavy}`;
      reading.faults.add('OUT_OF_RANGE', span, found, 'Leave the value out, or carry less in that case.');
      break;
    }
  }
}

const fractionTolerance = 1e-9;

function checkVariedFractions(axes: readonly PlacedAxis[], { wing }: Choices, reading: Reading): void {
  if (wing.form !== 'panels' || wing.panelWidth !== 'span_fraction') return;
  const paths = wing.panels.map((_, index) => `wing.panels[${index + 1}].span_fraction`);
  for (const axis of axes.filter((one) => one.paths.some((path) => paths.includes(path)))) {
    for (const { span, at } of rowsOf(axis, paths)) {
      const sum = paths.reduce(
        (total, path) => total + (at.get(path) ?? reading.inputs.get(path) ?? Number.NaN),
        0,
      );
      if (!(Math.abs(sum - 1) > fractionTolerance)) continue;
      const percent = Number((sum * 100).toPrecision(7));
      reading.faults.add(
        'OVERDETERMINED',
        span,
        `With this value the panels’ span fractions add up to ${percent} %.`,
        'Let the fractions step side by side, so that they add up to 100 %.',
      );
      break;
    }
  }
}

/** Both ends in one measure, metres behind the MAC's leading edge at the fixed values. */
function behindMac(value: number, kind: CgKind, { wing }: Baseline): number {
  if (kind === 'percent_mac') return value * wing.meanAerodynamicChord;
  return kind === 'station' ? value - wing.macLeadingEdge : value;
}

/** Equal ends are a single loading; less than this apart [m or share of the MAC] is rounding. */
const cgTolerance = 1e-9;

function isReversed(forward: number, aft: number, { cg }: Choices, baseline: Baseline): boolean {
  if (cg.forward === cg.aft) return forward - aft > cgTolerance;
  return behindMac(forward, cg.forward, baseline) - behindMac(aft, cg.aft, baseline) > cgTolerance;
}

/** The CG's ends at the fixed values. */
export function checkCg(choices: Choices, baseline: Baseline, reading: Reading): void {
  const forward = reading.inputs.get('cg.forward') ?? Number.NaN;
  const aft = reading.inputs.get('cg.aft') ?? Number.NaN;
  const span = reading.spans.get('cg.forward');
  if (!span || !isReversed(forward, aft, choices, baseline)) return;
  reading.faults.add(
    'CG_REVERSED',
    span,
    'The forward centre of gravity lies aft of the aft one.',
    'Swap forward and aft.',
  );
}

function checkVariedCg(
  forwardAxis: PlacedAxis | undefined,
  aftAxis: PlacedAxis | undefined,
  choices: Choices,
  baseline: Baseline,
  reading: Reading,
): void {
  const axis = forwardAxis ?? aftAxis;
  // on two axes only some combinations are reversed: `skip` can leave those out
  if (!axis || (forwardAxis && aftAxis && forwardAxis !== aftAxis)) return;
  const input = (path: string) => reading.inputs.get(path) ?? Number.NaN;
  for (const { span, at } of rowsOf(axis, ['cg.forward', 'cg.aft'])) {
    const forward = at.get('cg.forward') ?? input('cg.forward');
    if (!isReversed(forward, at.get('cg.aft') ?? input('cg.aft'), choices, baseline)) continue;
    reading.faults.add(
      'CG_REVERSED',
      span,
      'With this value the forward centre of gravity lies aft of the aft one.',
      'Leave it out, or let both ends step side by side: cg: [{forward: …, aft: …}].',
    );
    return;
  }
}
