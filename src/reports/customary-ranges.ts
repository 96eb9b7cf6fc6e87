import type { AircraftClass } from '../study/study.ts';

/** Customary range of a figure, SI; a study outside it gets a note, never an error. Common practice, no source. */
interface CustomaryRange {
  readonly figure: string;
  readonly from: number;
  readonly to: number;
}

const customary: Record<AircraftClass, readonly CustomaryRange[]> = {
  light_aeroplane: [
    range('tail_volume', 0.55, 0.8),
    range('wing_aspect_ratio', 6, 11),
    range('wing_formula_taper', 0.4, 1),
  ],
  homebuilt: [
    range('tail_volume', 0.45, 0.6),
    range('wing_aspect_ratio', 5, 8),
    range('wing_formula_taper', 0.5, 1),
  ],
  sailplane: [
    range('tail_volume', 0.4, 0.6),
    range('wing_aspect_ratio', 15, 28),
    range('wing_formula_taper', 0.3, 0.7),
  ],
  twin: [
    range('tail_volume', 0.7, 0.95),
    range('wing_aspect_ratio', 7, 10),
    range('wing_formula_taper', 0.4, 0.7),
  ],
  uncrewed: [],
};

function range(figure: string, from: number, to: number): CustomaryRange {
  return { figure, from, to };
}

/** Margins at the aft limit above this are large, and on a sailplane below the other one are met. */
const largeMargin = 0.3;
const smallSailplaneMargin = 0.1;
/** Neutral points of whole aeroplanes lie aft of this. */
const forwardNeutralPoint = 0.3;
/** Without an analysis, the aftmost CG for a first flight. */
export const firstFlightCg = 0.25;

/** Least and greatest value of a figure over the combinations of a run, SI. */
export interface Span {
  readonly least: number;
  readonly greatest: number;
}

export interface CustomaryInput {
  readonly aircraftClass?: AircraftClass;
  /** Spans of figures by name; absent ones draw no note. */
  readonly spans: ReadonlyMap<string, Span>;
  readonly show: (figure: string, value: number) => string;
}

/** Notes on what lies outside customary ranges; each says so itself and none is an error. */
export function customaryNotes({ aircraftClass, spans, show }: CustomaryInput): string[] {
  const notes: string[] = [];
  for (const { figure, from, to } of aircraftClass === undefined ? [] : customary[aircraftClass]) {
    const span = spans.get(figure);
    if (span === undefined || (span.least >= from && span.greatest <= to)) continue;
    notes.push(
      `\`${figure}\` runs from ${show(figure, span.least)} to ${show(figure, span.greatest)}; ` +
        `${show(figure, from)} to ${show(figure, to)} is customary for this class (common practice, no source).`,
    );
  }
  notes.push(...marginNotes(aircraftClass, spans, show), ...neutralPointNotes(spans, show));
  return notes;
}

function marginNotes(
  aircraftClass: AircraftClass | undefined,
  spans: CustomaryInput['spans'],
  show: CustomaryInput['show'],
): string[] {
  const margin = spans.get('static_margin_aft');
  if (margin === undefined) return [];
  const notes: string[] = [];
  if (margin.greatest >= largeMargin) {
    notes.push(
      `Static margins at the aft limit reach ${show('static_margin_aft', margin.greatest)}; ` +
        '30 % MAC and more is met, at a cost in trim drag and elevator power (common practice, no source).',
    );
  }
  if (aircraftClass === 'sailplane' && margin.least < smallSailplaneMargin) {
    notes.push(
      'Some static margins at the aft limit are under 10 % MAC, which is met on sailplanes (common practice, no source).',
    );
  }
  return notes;
}

function neutralPointNotes(spans: CustomaryInput['spans'], show: CustomaryInput['show']): string[] {
  const point = spans.get('neutral_point');
  if (point === undefined || point.least >= forwardNeutralPoint) return [];
  return [
    `The neutral point lies as far forward as ${show('neutral_point', point.least)}; ` +
      'for a whole aeroplane anything forward of 30 % MAC is unusual (common practice, no source).',
  ];
}
