/** The report on flight-test data as Markdown. */
import { displayUnit, showValue } from '../figures/display.ts';
import type { Study } from '../study/study.ts';
import type { ComparedState } from './compare.ts';
import type { FlownSeries, MeasuredNeutralPoint, PointKind } from './measure.ts';
import type { Prediction } from './predict.ts';
import type { FlownPoint, FlownWing } from './read-data.ts';
import type { FlownState } from './states.ts';
import type { Warning } from './warnings.ts';

export interface FlightTestReport {
  readonly study: Study;
  /** File name of the data, without its folder. */
  readonly data: string;
  readonly points: readonly FlownPoint[];
  readonly wing: FlownWing;
  readonly states: readonly ComparedState[];
  /** Pictures of a state, as paths to put into the text. */
  readonly picturesOf: (state: ComparedState) => readonly string[];
}

export const flightTestCaution =
  'Approach the aft limit in small steps, never by flying near neutral, under qualified supervision. The neutral point is extrapolated from safe CG positions; it is not to be flown to.';

const degrees = 180 / Math.PI;
/** N/Pa → N/kPa. */
const perKilopascal = 1000;

/** How a control is shown: factor from SI, decimals, names. */
const shown: Readonly<
  Record<
    PointKind,
    { factor: number; decimals: number; control: string; unit: string; atIdle: string; withPower: string }
  >
> = {
  'stick-fixed': {
    factor: degrees,
    decimals: 2,
    control: 'elevator, trailing edge down',
    unit: '°',
    atIdle: 'stick-fixed neutral point',
    withPower: 'trim slope limit',
  },
  'stick-free': {
    factor: perKilopascal,
    decimals: 3,
    control: 'stick force over dynamic pressure, pull',
    unit: 'N/kPa',
    atIdle: 'stick-free neutral point',
    withPower: 'force slope limit',
  },
};

/** Factor from SI in which a control is shown. */
export function controlFactor(kind: PointKind): number {
  return shown[kind].factor;
}

/** Name of the point at which the control goes flat: with power on it is not the neutral point. */
export function pointName(kind: PointKind, { idle }: FlownState): string {
  return idle ? shown[kind].atIdle : shown[kind].withPower;
}

/** Text of the user's own, so that it stays text in Markdown: no markup, no line of its own. */
export function plain(text: string): string {
  return text
    .replaceAll(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}]/gu, ' ')
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll(/[\\`*_[\]|#]/g, '\\$&');
}

export function flightTestMarkdown(report: FlightTestReport): string {
  const { study, data, points, states } = report;
  const { area, mac, macLeadingEdge } = report.wing;
  const length = (value: number) => showValue(value, 'length', study.show);
  return [
    `# ${plain(study.title)}: flight test`,
    '',
    `**${flightTestCaution}**`,
    '',
    `${points.length} points of ${plain(data)}, in ${states.length} state${states.length === 1 ? '' : 's'}. The study's own fixed values are taken for the flown aeroplane: wing area ${showValue(area, 'area', study.show)}, MAC ${length(mac)}, its leading edge at station ${length(macLeadingEdge)}.${study.corrections === undefined ? '' : " The study's own correction is left out of what it predicts."}`,
    '',
    ...states.flatMap((state) => stateSection(state, report)),
    ...method,
  ].join('\n');
}

function stateSection(compared: ComparedState, report: FlightTestReport): string[] {
  const { state, measured, prediction, warnings } = compared;
  const all = [
    ...warnings,
    ...measured.flatMap((point) => point.warnings.map((warning) => ofKind(warning, point, measured))),
  ];
  return [
    `## ${plain(sentence(state.name))}`,
    '',
    ...measured.flatMap((point) => [...seriesTable(point, prediction, report.study), '']),
    ...neutralPointTable(compared),
    '',
    ...(all.length === 0 ? [] : [...all.map(({ code, text }) => `- **${code}** ${text}`), '']),
    ...report
      .picturesOf(compared)
      .flatMap((path) => [
        `![Measured curves and slopes, ${plain(state.name)}](<${path.replaceAll(/[<>\n]/g, '')}>)`,
        '',
      ]),
    ...correctionBlock(compared, report.data),
  ];
}

function sentence(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

/** With two measurements in a state a warning says of which it speaks. */
function ofKind(
  warning: Warning,
  { kind }: MeasuredNeutralPoint,
  all: readonly MeasuredNeutralPoint[],
): Warning {
  return all.length === 1 ? warning : { ...warning, text: `${sentence(kind)}: ${warning.text}` };
}

const percent = (fraction: number) => (100 * fraction).toFixed(1);
const signed = (text: string) => (Number(text) > 0 ? `+${text}` : text.replace(/^-(?=0\.?0*$)/, ''));

function seriesTable({ kind, series }: MeasuredNeutralPoint, prediction: Prediction, study: Study): string[] {
  const { control, unit, factor, decimals } = shown[kind];
  const predicted = prediction.of[kind];
  const speed = displayUnit('speed', study.show);
  const value = (si: number | undefined) =>
    si === undefined ? '–' : signed((si * factor).toFixed(decimals));
  const row = ({ cg, points, liftCoefficients, slope, slopeUncertainty }: FlownSeries) => {
    const speeds = points.map((point) => point.calibratedSpeed);
    return [
      percent(cg),
      String(points.length),
      `${(Math.min(...speeds) * speed.factor).toFixed(0)} to ${(Math.max(...speeds) * speed.factor).toFixed(0)}`,
      `${Math.min(...liftCoefficients).toFixed(2)} to ${Math.max(...liftCoefficients).toFixed(2)}`,
      value(slope?.intercept),
      value(slope?.slope),
      slope === undefined ? '–' : (slope.standardError * factor).toFixed(decimals),
      slopeUncertainty === undefined ? '–' : `± ${(slopeUncertainty * factor).toFixed(decimals)}`,
      value(finite(predicted.lineAt(cg).slope)),
    ];
  };
  const head = [
    'CG [% MAC]',
    'points',
    `calibrated airspeed [${speed.unit}]`,
    'C_L',
    `at C_L 0 [${unit}]`,
    `slope [${unit} per C_L]`,
    'standard error',
    '95 %',
  ];
  return [
    `${sentence(control)} positive, against C_L:`,
    '',
    ...table([...head, 'slope predicted'], series.map(row)),
  ];
}

function finite(value: number): number | undefined {
  return Number.isFinite(value) ? value : undefined;
}

function table(head: readonly string[], rows: readonly (readonly string[])[]): string[] {
  const line = (cells: readonly string[]) => `| ${cells.join(' | ')} |`;
  return [line(head), `|${head.map(() => '---:').join('|')}|`, ...rows.map(line)];
}

function neutralPointTable({ state, measured, prediction }: ComparedState): string[] {
  const head = [
    '',
    'measured [% MAC]',
    '95 % limits',
    `predicted, ${plain(prediction.condition.name)}`,
    'measured − predicted',
  ];
  const rows = measured.map(({ kind, fit }) => {
    const predicted = prediction.of[kind].at;
    const difference = fit === undefined ? Number.NaN : fit.neutralPoint - predicted;
    return [
      pointName(kind, state),
      fit === undefined ? '–' : percent(fit.neutralPoint),
      limitsText(fit),
      Number.isNaN(predicted) ? '–' : percent(predicted),
      Number.isNaN(difference) ? '–' : signed(percent(difference)),
    ];
  });
  return table(head, rows);
}

function limitsText(fit: MeasuredNeutralPoint['fit']): string {
  if (fit === undefined) return '–';
  return fit.limits === undefined ? 'open' : `${percent(fit.limits.lower)} to ${percent(fit.limits.upper)}`;
}

/** A block that a study can take as it stands. */
function correctionBlock({ correction, state, prediction }: ComparedState, data: string): string[] {
  if (correction === undefined) return ['No correction is offered for this state.', ''];
  const { value, cautious, fit } = correction;
  const { condition, of } = prediction;
  const source = `flight test (${data}), ${state.name}: ${percent(fit.neutralPoint)} % MAC, 95 % limits ${limitsText(fit)}; predicted ${percent(of['stick-fixed'].at)} in ${condition.name}`;
  return [
    `Correction for the study, to be written at its top level${state.idle ? '' : ' (measured with power on: one at idle is to be preferred)'}. By the forward 95 % limit, the cautious choice, it would be ${signed(percent(cautious))} %.`,
    '',
    '```yaml',
    'corrections:',
    `  neutral_point: ${signed(percent(value))} %`,
    `  source: ${yamlText(source)}`,
    '```',
    '',
  ];
}

/** A YAML text in single quotes: nothing in it is read as anything else. */
function yamlText(text: string): string {
  return `'${text.replaceAll(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}]/gu, ' ').replaceAll("'", "''")}'`;
}

const method = [
  '## How it is worked out',
  '',
  '- Lift coefficient: C_L = m g/(q S), steady level flight, q from calibrated airspeed and pressure height in the standard atmosphere (ISO 2533).',
  '- Stick fixed: dδ/dC_L = (h − h_n)/(C_Lδ (h_t − h_n)), exact for linear parts. A least-squares line for each CG; the slopes are linear in h, and reach zero at h_n.',
  '- Stick free: P/q = K (h − h_n′)(C_L − C_L,trim), exact for linear parts with the trim tab left alone at each CG (ours, from the hinge moment; the slope of P/q against C_L is the usual one of flight-test practice, from memory). A spring or bobweight is in h_n′ as it acts at the flown weight.',
  '- One fit of all points of a state: an intercept for each CG, slopes linear in h, one scatter. 95 % limits by Fieller (1954, from memory) with Student’s t; they are not symmetrical. Errors of speed, mass and CG that are common to all points are not in them.',
  '- Along a curve the wake sinks and its downwash changes, so curves are never quite straight: in the model of our test aeroplane, flown without scatter, the extrapolated point lies 0.7 % MAC ahead of the neutral point at the condition’s own speed.',
  '- A predicted slope is that of the study at the condition’s speed.',
  '- A correction is for the aeroplane as it was flown; other states and variants differ.',
  '- Local airworthiness rules and licensed practice decide.',
  '',
];
