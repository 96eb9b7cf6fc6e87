/**
 * Random studies over every layout, way of giving sizes, method and kind of axis. What a study says is
 * kept beside its text in SI, worked out here and not by the program, so that a test can hold the
 * program's rows against it.
 */
import fc from 'fast-check';

/** One number that a study varies, with the values it is to take. */
export interface ExpectedAxis {
  readonly path: string;
  readonly values: readonly number[];
}

/** One edge to be kept, SI; `figure` as the table calls it, without its unit. */
export interface ExpectedEdge {
  readonly figure: string;
  readonly sign: 1 | -1;
  readonly limit: number;
  readonly scale: number;
}

/** A combination is dropped when the number at `path` lies above (below) `limit`. */
export interface ExpectedSkip {
  readonly path: string;
  readonly side: 'above' | 'below';
  readonly limit: number;
}

export interface RandomStudy {
  readonly text: string;
  readonly axes: readonly ExpectedAxis[];
  readonly edges: readonly ExpectedEdge[];
  readonly band: { readonly lower: number | undefined; readonly upper: number | undefined };
  readonly skip: ExpectedSkip | undefined;
}

const degree = Math.PI / 180;
const foot = 0.3048;
const knot = 1852 / 3600;

/** SI value of one unit as a study writes it; only exact definitions. */
const unitSize = {
  m: 1,
  ft: foot,
  'm^2': 1,
  'ft^2': foot ** 2,
  deg: degree,
  kg: 1,
  kt: knot,
  '': 1,
} as const;
type Unit = keyof typeof unitSize;

/** A number as a study writes it. */
interface Written {
  readonly value: number;
  readonly unit: Unit;
}

const short = (value: number) => Number(value.toPrecision(5));
const written = (value: number, unit: Unit): Written => ({ value: short(value), unit });
const inSi = ({ value, unit }: Written) => value * unitSize[unit];
const textOf = ({ value, unit }: Written) => (unit === '' ? `${value}` : `${value} ${unit}`);

/** Draws choices and numbers for one study; everything random goes through it, so that cases shrink. */
class Draw {
  constructor(private readonly draw: fc.GeneratorValue) {}

  oneOf<T>(...choices: readonly T[]): T {
    return choices[this.whole(0, choices.length - 1)];
  }
  whole(min: number, max: number): number {
    return this.draw(fc.integer, { min, max });
  }
  maybe(share: number): boolean {
    return this.whole(0, 99) < 100 * share;
  }
  between(from: number, to: number): number {
    return from + ((to - from) * this.whole(0, 1000)) / 1000;
  }
}

/** The wing's rough outline, for placing tail and body around it [m]. */
interface Outline {
  readonly span: number;
  readonly chord: number;
  readonly root: number;
}

class StudyWriter {
  /** Numbers given, which can vary, with the range that leaves the aeroplane whole. */
  readonly given = new Map<string, { at: Written; least: number; most: number }>();

  constructor(readonly draw: Draw) {}

  /** Notes a number and gives its text `key: value unit`; it may vary between two factors of its value. */
  give(path: string, value: number, unit: Unit, least = 0.8, most = 1.25): string {
    const at = written(value, unit);
    this.given.set(path, { at, least, most });
    const key = path.slice(path.lastIndexOf('.') + 1);
    return `${key}: ${textOf(at)}`;
  }

  length(path: string, metres: number, least?: number, most?: number): string {
    return this.draw.oneOf('m', 'ft') === 'm'
      ? this.give(path, metres, 'm', least, most)
      : this.give(path, metres / foot, 'ft', least, most);
  }
}

function sections(write: StudyWriter, surface: 'wing' | 'tail'): string {
  const { draw } = write;
  if (draw.maybe(0.5)) return `section: ${draw.oneOf('naca-0012', 'naca-2412', 'naca-4415', 'naca-63-415')}`;
  const centre = write.give(`${surface}.section.aerodynamic_centre`, draw.between(0.2, 0.3), '', 0.95, 1.05);
  const slope = short(draw.between(4.6, 7.4));
  return `section: {lift_slope: ${slope} /rad, zero_lift_angle: ${short(draw.between(-6, 3))} deg, ${centre}}`;
}

function sweepOf(write: StudyWriter, prefix: string, most: number): string {
  const kind = write.draw.oneOf('sweep_quarter_chord', 'sweep_leading_edge');
  return write.give(`${prefix}.${kind}`, write.draw.between(-most, most), 'deg', 0.5, 1.1);
}

function wingOf(write: StudyWriter): { text: string; outline: Outline } {
  const { draw } = write;
  const span = 10 ** draw.between(-0.5, 1.5);
  const aspectRatio = draw.between(3, 28);
  const chord = span / aspectRatio;
  const root = chord * draw.between(-2, 6);
  const panels = draw.maybe(0.4);
  const widths = panels && draw.maybe(0.5);
  const sizes: Record<string, () => string> = {
    area: () => write.give('wing.area', (span * chord) / foot ** 2, 'ft^2'),
    span: () => write.length('wing.span', span),
    aspect_ratio: () => write.give('wing.aspect_ratio', aspectRatio, '', 0.9, 1.1),
    root_chord: () => write.length('wing.root_chord', chord * draw.between(1, 1.4)),
  };
  const pairs = ['area span', 'area aspect_ratio', 'span aspect_ratio', 'span root_chord', 'area root_chord'];
  const keys = widths
    ? [draw.oneOf('area', 'root_chord')]
    : draw.oneOf(...pairs, 'aspect_ratio root_chord').split(' ');
  const lines = keys.map((key) => sizes[key]());
  lines.push(write.length('wing.root_leading_edge', root, 1, 1.02));
  lines.push(sections(write, 'wing'));
  if (draw.maybe(0.5)) lines.push(write.give('wing.washout', draw.between(-4, 5), 'deg'));
  if (draw.maybe(0.5)) lines.push(write.length('wing.height', chord * draw.between(-1, 1)));
  if (panels) lines.push(panelsOf(write, widths, span));
  else {
    lines.push(write.give('wing.taper', draw.between(0.15, 1.2), '', 0.8, 1.2), sweepOf(write, 'wing', 30));
    if (draw.maybe(0.5)) lines.push(write.give('wing.dihedral', draw.between(-5, 15), 'deg'));
  }
  return { text: lines.join(', '), outline: { span, chord, root } };
}

function panelsOf(write: StudyWriter, widths: boolean, span: number): string {
  const { draw } = write;
  const count = draw.whole(1, 4);
  const panels = Array.from({ length: count }, (_, index) => {
    const path = `wing.panels[${index + 1}]`;
    const width = widths
      ? write.length(`${path}.width`, (span / 2 / count) * draw.between(0.7, 1.3))
      : `span_fraction: ${1 / count}`;
    const taper = write.give(`${path}.taper`, draw.between(0.5, 1.1), '', 0.9, 1.1);
    const dihedral = write.give(`${path}.dihedral`, draw.between(0, 10), 'deg');
    return `{${width}, ${taper}, ${sweepOf(write, path, 15)}, ${dihedral}}`;
  });
  return `panels: [${panels.join(', ')}]`;
}

/** The tail; `reach` is where its quarter-MAC lies at most, for the body's end [m]. */
function tailOf(write: StudyWriter, { span, chord, root }: Outline): { text: string; reach: number } {
  const { draw } = write;
  const layout = draw.oneOf('conventional', 'mid', 'T', 'V');
  const arm = chord * draw.between(1, 2) + span * draw.between(0.1, 0.5);
  const lines = [`layout: ${layout}`];
  if (layout === 'V') lines.push(write.give('tail.v_angle', draw.between(15, 50), 'deg'));
  const area = span * chord * draw.between(0.08, 0.3);
  lines.push(
    draw.maybe(0.5)
      ? write.give('tail.area', area, 'm^2', 0.5, 2)
      : write.give('tail.volume', draw.between(0.2, 0.9), '', 0.5, 2),
    draw.maybe(0.5)
      ? write.length('tail.arm', arm, draw.oneOf(0.15, 0.7), 1.2)
      : write.length('tail.station', root + chord + arm, 1, 1.05),
    draw.maybe(0.5)
      ? write.give('tail.aspect_ratio', draw.between(1.5, 8), '')
      : write.length('tail.span', Math.sqrt(area * draw.between(2, 7)), 0.9, 1.1),
    write.give('tail.taper', draw.between(0.3, 1), '', 0.9, 1.1),
    sweepOf(write, 'tail', 25),
    write.length('tail.above_wing_root_chord', span * draw.between(-0.1, 0.3), 0.5, 2),
    sections(write, 'tail'),
  );
  if (draw.maybe(0.5))
    lines.push(write.give('tail.dynamic_pressure_ratio', draw.between(0.8, 1), '', 0.9, 1.1));
  if (draw.maybe(0.3)) lines.push('all_moving: true');
  return { text: lines.join(', '), reach: root + 3 * chord + 1.3 * arm + 0.6 * span };
}

function bodyOf(write: StudyWriter, { chord, root, span }: Outline, reach: number): string {
  const { draw } = write;
  if (draw.maybe(0.2)) return 'none';
  const boom = draw.maybe(0.3);
  const nose = root - chord * draw.between(0.2, 3);
  const end = boom ? root + chord * draw.between(0.8, 2.5) : reach;
  const count = draw.whole(2, 7);
  const stations = Array.from({ length: count }, (_, index) => {
    const path = `body.stations[${index + 1}]`;
    const at = nose + ((end - nose) * index) / (count - 1);
    const width = index === 0 && draw.maybe(0.3) ? 0 : span * draw.between(0.01, 0.15);
    const wide = write.length(`${path}.width`, width);
    const moved = index > 0 && at > 0 ? write.length(`${path}.at`, at, 0.6, 1.5) : `at: ${short(at)} m`;
    return `{${moved}, ${wide}, depth: ${short(width)} m}`;
  });
  const boomText = boom ? `, boom: {${write.length('body.boom.width', 0.01 * span)}, depth: 0.05 m}` : '';
  return `{stations: [${stations.join(', ')}]${boomText}}`;
}

function cgOf(write: StudyWriter, { chord, root }: Outline): string {
  const { draw } = write;
  const kind = draw.oneOf('percent_mac', 'station', 'behind_mac_leading_edge');
  const forward = draw.between(0.1, 0.3);
  const aft = forward + draw.between(0.02, 0.2);
  const end = (name: 'forward' | 'aft', h: number, least: number, most: number) => {
    const path = `cg.${name}`;
    if (kind === 'percent_mac') return write.give(path, h, '', least, most);
    if (kind === 'station') return write.length(path, root + 0.1 * chord + h * chord, 1, 1.0001);
    return write.length(path, h * chord, least, most);
  };
  const height = draw.maybe(0.4)
    ? `, ${write.length('cg.above_datum', chord * draw.between(-0.5, 0.5))}`
    : '';
  return `{as: ${kind}, ${end('forward', forward, 0.7, 1.5)}, ${end('aft', aft, 0.8, 1.2)}${height}}`;
}

/** One axis of a given number: its text after the path, and its values in SI. */
function axisOf(write: StudyWriter, path: string): { text: string; values: number[] } {
  const { draw } = write;
  const { at, least, most } = write.given.get(path) as { at: Written; least: number; most: number };
  const { value, unit } = at;
  const [from, to] = [value * least, value * most].map(short);
  const written = (number: number) => textOf({ value: number, unit });
  const si = (numbers: readonly number[]) => numbers.map((number) => inSi({ value: number, unit }));
  const long = draw.maybe(0.04);
  const count = long ? draw.whole(2100, 2500) : draw.whole(2, 5);
  const between = (share: number) => from + (to - from) * share;
  const linear = Array.from({ length: count }, (_, k) => between(k / (count - 1)));
  if (from === to) return { text: `[${written(value)}]`, values: si([value]) };
  switch (long ? 'count' : draw.oneOf('list', 'count', 'step', 'logarithmic')) {
    case 'list': {
      const list = [...new Set(linear.map((number) => Number(number.toPrecision(6))))];
      return { text: `[${list.map(written).join(', ')}]`, values: si(list) };
    }
    case 'step': {
      const step = short((to - from) / (count - 1));
      const list = Array.from({ length: count }, (_, k) => from + step * k);
      const last = Number(list[count - 1].toPrecision(12));
      return {
        text: `{from: ${written(from)}, to: ${written(last)}, step: ${written(step)}}`,
        values: si(list),
      };
    }
    case 'logarithmic':
      if (from > 0) {
        const ratio = to / from;
        return {
          text: `{from: ${written(from)}, to: ${written(to)}, count: ${count}, spacing: logarithmic}`,
          values: si(linear.map((_, k) => from * ratio ** (k / (count - 1)))),
        };
      }
      break;
    default:
  }
  return { text: `{from: ${written(from)}, to: ${written(to)}, count: ${count}}`, values: si(linear) };
}

function varyOf(write: StudyWriter): { text: string; axes: ExpectedAxis[] } {
  const { draw } = write;
  const paths = [...write.given.keys()];
  const chosen = new Set(Array.from({ length: draw.whole(0, 4) }, () => draw.oneOf(...paths)));
  // ends of the CG range on two axes cross in some combinations
  if (chosen.has('cg.forward') || chosen.has('cg.aft')) chosen.add('cg.forward').add('cg.aft');
  const axes: ExpectedAxis[] = [];
  const lines: string[] = [];
  let combinations = 1;
  for (const path of chosen) {
    const { text, values } = axisOf(write, path);
    if (combinations * values.length > 2500) continue;
    combinations *= values.length;
    axes.push({ path, values });
    lines.push(`  ${path}: ${text}`);
  }
  return { text: lines.length === 0 ? '' : `vary:\n${lines.join('\n')}\n`, axes };
}

/** Figures that any study has, with the unit and size of a limit that some rows keep and some do not. */
function limitsOf({ span, chord }: Outline): [figure: string, unit: Unit, about: number][] {
  return [
    ['wing_span', 'm', span],
    ['mac', 'm', chord],
    ['tail_area', 'm^2', 0.15 * span * chord],
    ['tail_span', 'm', 0.3 * span],
    ['neutral_point', '', 0.4],
    ['downwash_gradient', '', 0.4],
    ['wing_lift_slope', '', 4.5],
  ];
}

/** 1 % of the MAC, or a twentieth of the limit, unless the study says otherwise. */
function scaleOf(figure: string, ...limits: number[]): number {
  return figure === 'neutral_point' ? 0.01 : 0.05 * Math.max(...limits.map(Math.abs));
}

function requireOf(write: StudyWriter, outline: Outline) {
  const { draw } = write;
  const lower = draw.maybe(0.85) ? short(draw.between(0, 0.1)) : undefined;
  const upper = draw.maybe(0.7) ? short(draw.between(0.15, 0.4)) : undefined;
  const edges: ExpectedEdge[] = [];
  const lines: string[] = [];
  if (lower !== undefined) edges.push({ figure: 'static_margin_aft', sign: 1, limit: lower, scale: 0.01 });
  if (upper !== undefined)
    edges.push({ figure: 'static_margin_forward', sign: -1, limit: upper, scale: 0.01 });
  const band = [
    ...(lower === undefined ? [] : [`at_least: ${lower}`]),
    ...(upper === undefined ? [] : [`at_most: ${upper}`]),
  ];
  if (band.length > 0) lines.push(`  static_margin: {${band.join(', ')}}`);
  for (const [figure, unit, about] of limitsOf(outline)) {
    if (!draw.maybe(0.25)) continue;
    const least = short(about * draw.between(0.5, 1));
    const most = short(about * draw.between(1, 1.6));
    const text = (value: number) =>
      figure === 'wing_lift_slope' ? `${value} /rad` : textOf({ value, unit });
    const scale = scaleOf(figure, least, most);
    lines.push(`  limit_on_${figure}: {figure: ${figure}, at_least: ${text(least)}, at_most: ${text(most)}}`);
    edges.push({ figure, sign: 1, limit: least, scale }, { figure, sign: -1, limit: most, scale });
  }
  if (draw.maybe(0.2)) {
    lines.push('  in_range: true');
    edges.push({ figure: 'outside_fitted_range', sign: -1, limit: 0, scale: 1 });
  }
  return { text: lines.length === 0 ? '' : `require:\n${lines.join('\n')}\n`, edges, band: { lower, upper } };
}

function skipOf(
  write: StudyWriter,
  axes: readonly ExpectedAxis[],
): { text: string; skip: ExpectedSkip | undefined } {
  const { draw } = write;
  const axis = axes.find(({ values }) => values.length > 2);
  if (axis === undefined || !draw.maybe(0.4)) return { text: '', skip: undefined };
  const { unit } = (write.given.get(axis.path) as { at: Written }).at;
  // half of the limits are values of the axis, which belong to the kept side
  const at = draw.whole(0, axis.values.length - 1);
  const si = draw.maybe(0.5) ? axis.values[at] : (axis.values[0] + axis.values[1]) / 2;
  const side = draw.oneOf('above', 'below');
  const value = Number((si / unitSize[unit]).toPrecision(12));
  const text = `skip:\n  - {when: {"${axis.path}": {${side}: ${textOf({ value, unit })}}}, because: drawn}\n`;
  return { text, skip: { path: axis.path, side, limit: inSi({ value, unit }) } };
}

function methodsOf({ draw }: StudyWriter): string {
  const methods = {
    lift_slope: draw.oneOf('polhamus', 'jones', 'table'),
    downwash: draw.oneOf('torenbeek', 'handbook'),
    aerodynamic_centre: draw.oneOf('table', 'quarter_mac'),
    body_moment: draw.oneOf('multhopp', 'quick_estimate'),
  };
  return `{${Object.entries(methods)
    .map(([key, word]) => `${key}: ${word}`)
    .join(', ')}}`;
}

function writeStudy(draw: Draw): RandomStudy {
  const write = new StudyWriter(draw);
  const wing = wingOf(write);
  const tail = tailOf(write, wing.outline);
  const body = bodyOf(write, wing.outline, tail.reach);
  const cg = cgOf(write, wing.outline);
  const { span, chord } = wing.outline;
  const speed = Math.max(8, 15 * Math.sqrt(chord) + draw.between(0, 50));
  const massOfLift = 0.6 * speed ** 2 * span * chord * draw.between(0.1, 1.2);
  const mass = write.give('mass', Math.min(45_000, Math.max(0.01, massOfLift / 9.8)), 'kg');
  const fast = write.give('conditions[1].speed', speed / knot, 'kt');
  const high = write.give('conditions[1].height', draw.between(0, 15_000), 'm');
  const vary = varyOf(write);
  const skip = skipOf(write, vary.axes);
  const required = requireOf(write, wing.outline);
  const text = `title: Drawn at random
show: ${draw.oneOf('metric', 'US')}
aeroplane:
  ${mass}
  wing: {${wing.text}}
  tail: {${tail.text}}
  body: ${body}
  cg: ${cg}
conditions: [{name: drawn, ${fast}, ${high}}]
methods: ${methodsOf(write)}
${vary.text}${skip.text}${required.text}`;
  return { text, axes: vary.axes, skip: skip.skip, edges: required.edges, band: required.band };
}

/** Studies, most of them without a fault. */
export const randomStudies: fc.Arbitrary<RandomStudy> = fc.gen().map((draw) => writeStudy(new Draw(draw)));
