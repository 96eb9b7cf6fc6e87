import { inputDefinition } from './inputs.ts';
import { readMaximumLift, readSection } from './read-section.ts';
import type { Reading } from './reading.ts';
import { firstOf, keySpan, type ListNode, type SourceNode, valueIn } from './source.ts';
import type { SweepKind, WingChoices, WingSize } from './study.ts';

export const wingSizes: readonly WingSize[] = [
  'wing.area',
  'wing.span',
  'wing.aspect_ratio',
  'wing.root_chord',
];
const lastKey = (path: string) => path.slice(path.lastIndexOf('.') + 1);

/** Panels add up to the semi-span within this share of it. */
const fractionTolerance = 1e-9;
/** No wing has more panels than this. */
const mostPanels = 40;

/** Reads `aeroplane.wing` into the inputs. */
export function readWing(map: SourceNode, reading: Reading): WingChoices {
  const list = valueIn(map, 'panels');
  const panels = list?.kind === 'list' ? list : undefined;
  const form = panels ? 'panels' : 'trapezoid';
  const panelWidth = panels ? readPanelWidths(panels, reading) : 'width';
  const sweeps = panels ? panels.items.map((panel, index) => readPanel(panel, index + 1, reading)) : [];
  const sweep = panels ? refuseBesidePanels(map, reading) : readTrapezoid(map, reading);
  const given = readSizes(map, panels !== undefined && panelWidth === 'width', reading);
  for (const key of ['incidence', 'washout', 'root_leading_edge', 'height'])
    reading.take(map, key, `wing.${key}`);
  const section = readSection('wing', map, reading);
  readMaximumLift('wing', map, reading);
  const choices = {
    form,
    given,
    sweep,
    panels: sweeps.map((kind) => ({ sweep: kind })),
    panelWidth,
  } as const;
  return section === undefined ? choices : { ...choices, section };
}

/** The one sweep of a wing or a panel; unswept along the quarter chord where none is given. */
export function readSweep(map: SourceNode, prefix: string, reading: Reading): SweepKind {
  const quarter = valueIn(map, 'sweep_quarter_chord');
  const leading = valueIn(map, 'sweep_leading_edge');
  if (quarter && leading) {
    reading.faults.add(
      'OVERDETERMINED',
      keySpan(map, 'sweep_leading_edge'),
      `${prefix} has two sweeps; each settles the other.`,
      'Keep sweep_quarter_chord or sweep_leading_edge.',
    );
  }
  const kind = leading && !quarter ? 'leading_edge' : 'quarter_chord';
  reading.take(map, `sweep_${kind}`, `${prefix}.sweep_${kind}`);
  return kind;
}

function readTrapezoid(map: SourceNode, reading: Reading): SweepKind {
  reading.take(map, 'dihedral', 'wing.dihedral');
  if (!reading.take(map, 'taper', 'wing.taper')) {
    reading.inputs.set('wing.taper', Number.NaN);
    reading.faults.addBeside(
      'MISSING_KEY',
      firstOf(map),
      'aeroplane.wing has neither taper nor panels.',
      'Add taper: (1 for a rectangular wing), or a list of panels.',
    );
  }
  return readSweep(map, 'wing', reading);
}

function refuseBesidePanels(map: SourceNode, reading: Reading): SweepKind {
  for (const key of ['taper', 'sweep_quarter_chord', 'sweep_leading_edge', 'dihedral']) {
    if (!valueIn(map, key)) continue;
    reading.faults.add(
      'OVERDETERMINED',
      keySpan(map, key),
      `wing.${key} stands beside panels, which have each their own.`,
      `Give ${key} on the panels.`,
    );
  }
  return 'quarter_chord';
}

function readPanel(panel: SourceNode, number: number, reading: Reading): SweepKind {
  const prefix = `wing.panels[${number}]`;
  reading.take(panel, 'taper', `${prefix}.taper`);
  if (!reading.inputs.has(`${prefix}.taper`)) reading.inputs.set(`${prefix}.taper`, Number.NaN);
  reading.take(panel, 'dihedral', `${prefix}.dihedral`);
  return readSweep(panel, prefix, reading);
}

function readPanelWidths(panels: ListNode, reading: Reading): WingChoices['panelWidth'] {
  if (panels.items.length === 0 || panels.items.length > mostPanels) {
    reading.faults.add(
      'OUT_OF_RANGE',
      panels.span,
      `wing.panels lists ${panels.items.length} panels; 1 to ${mostPanels} are possible.`,
      panels.items.length ? 'Merge panels.' : 'List at least one panel, or give taper instead.',
    );
  }
  const asFraction = panels.items.some((panel) => valueIn(panel, 'span_fraction'));
  const kind = asFraction ? 'span_fraction' : 'width';
  panels.items.forEach((panel, index) => {
    readPanelWidth(panel, index + 1, kind, reading);
  });
  if (asFraction) checkFractionSum(panels, reading);
  return kind;
}

function readPanelWidth(
  panel: SourceNode,
  number: number,
  kind: WingChoices['panelWidth'],
  reading: Reading,
): void {
  const path = `wing.panels[${number}].${kind}`;
  const given = reading.take(panel, kind, path);
  if (!given) reading.inputs.set(path, Number.NaN);
  const other = kind === 'width' ? 'span_fraction' : 'width';
  const hasOther = valueIn(panel, other) !== undefined;
  if (hasOther) {
    reading.faults.add(
      'OVERDETERMINED',
      keySpan(panel, other),
      `wing.panels[${number}] gives ${other} where the panels give ${kind}.`,
      'Give all panels alike, by width or by span_fraction.',
    );
  } else if (!given && panel.kind === 'map') {
    reading.faults.addBeside(
      'MISSING_KEY',
      firstOf(panel),
      `wing.panels[${number}] has no ${kind}.`,
      asPanelRemedy(kind),
    );
  }
}

function asPanelRemedy(kind: WingChoices['panelWidth']): string {
  return kind === 'width'
    ? 'Add width: or, on all panels, span_fraction:.'
    : 'Add span_fraction: to this panel too.';
}

function checkFractionSum(panels: ListNode, reading: Reading): void {
  const sum = panels.items.reduce(
    (total, _, index) =>
      total + (reading.inputs.get(`wing.panels[${index + 1}].span_fraction`) ?? Number.NaN),
    0,
  );
  if (!(Math.abs(sum - 1) > fractionTolerance)) return;
  reading.faults.add(
    'OVERDETERMINED',
    panels.items.length ? keySpan(panels.items[0]!, 'span_fraction') : panels.span,
    `The span fractions of the panels add up to ${Number((sum * 100).toPrecision(7))} %.`,
    'Make them add up to 100 %.',
  );
}

function readSizes(map: SourceNode, spanFollows: boolean, reading: Reading): WingSize[] {
  const present = wingSizes.filter((path) => valueIn(map, lastKey(path)));
  const spanStands = spanFollows && present.includes('wing.span');
  if (spanStands) {
    reading.faults.add(
      'OVERDETERMINED',
      keySpan(map, 'span'),
      'wing.span stands beside panels of stated width, which settle the span.',
      'Remove span, or give the panels by span_fraction.',
    );
  }
  const usable = spanFollows ? present.filter((path) => path !== 'wing.span') : present;
  const wanted = spanFollows ? 1 : 2;
  const given = usable.slice(0, wanted);
  for (const path of given) reading.enter(path, valueIn(map, lastKey(path))!, inputDefinition(path));
  checkSizeCount(map, usable, wanted, reading);
  return given.length === wanted ? given : fillSizes(given, spanFollows, reading);
}

function checkSizeCount(
  map: SourceNode,
  usable: readonly WingSize[],
  wanted: number,
  reading: Reading,
): void {
  const names = usable.map(lastKey);
  if (usable.length > wanted) {
    reading.faults.add(
      'OVERDETERMINED',
      keySpan(map, names[wanted]!),
      `aeroplane.wing gives ${names.join(', ')}; ${wanted === 1 ? 'one settles it' : 'two settle the rest'}.`,
      `Keep ${wanted === 1 ? 'one' : 'two'} of them.`,
    );
  } else if (usable.length < wanted) {
    const choices =
      wanted === 1 ? 'one of area, aspect_ratio, root_chord' : 'two of area, span, aspect_ratio, root_chord';
    reading.faults.add(
      'UNDERDETERMINED',
      keySpan(map, names[0] ?? ''),
      `aeroplane.wing gives ${names.join(' and ') || 'no size'}, which does not settle its size.`,
      `Give ${choices}.`,
    );
  }
}

/** Stand-ins after a fault, so that the rest of the study can still be checked. */
function fillSizes(given: readonly WingSize[], spanFollows: boolean, reading: Reading): WingSize[] {
  const order: readonly WingSize[] = spanFollows ? ['wing.area'] : ['wing.area', 'wing.span'];
  const filled = [...new Set([...given, ...order])].slice(0, order.length);
  for (const path of filled) if (!reading.inputs.has(path)) reading.inputs.set(path, Number.NaN);
  return filled;
}
