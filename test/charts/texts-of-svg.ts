import { textWidth } from '../../src/charts/text-width.ts';

/** One line of text in a picture: its box's middle, size and turn. */
export interface DrawnText {
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  /** [rad], clockwise. */
  readonly turn: number;
}

const token = /<(\/?)(g|text|tspan)([^>]*?)(\/?)>([^<]*)/g;
/** Height of capitals and figures over the font size; common practice for grotesques, no source. */
const capHeight = 0.73;

/** Every line of text of an SVG picture, in the picture's pixels. */
export function textsOfSvg(svg: string): DrawnText[] {
  const shifts: [number, number][] = [[0, 0]];
  const texts: DrawnText[] = [];
  let open: Record<string, string> = {};
  let line = 0;
  for (const [, closing, tag, attributes, , content] of svg.matchAll(token)) {
    if (tag === 'g') {
      if (closing) shifts.pop();
      else shifts.push(added(shifts.at(-1)!, shiftOf(attributes!)));
      continue;
    }
    if (closing) continue;
    const own = attributesOf(attributes!);
    if (tag === 'text') {
      open = own;
      line = 0;
    } else line += Number(own.dy ?? 0);
    if (content!.trim() !== '') texts.push(drawn(open, unescaped(content!), line, shifts.at(-1)!));
  }
  return texts;
}

function drawn(
  attributes: Record<string, string>,
  text: string,
  down: number,
  group: [number, number],
): DrawnText {
  const size = Number.parseFloat(attributes['font-size'] ?? '11');
  const boldness = Number(attributes['font-weight'] ?? 400) >= 600 ? 600 : 400;
  const width = textWidth(text, size, boldness);
  const height = capHeight * size;
  const turn = (Number(/rotate\(([-\d.]+)/.exec(attributes.transform ?? '')?.[1] ?? 0) * Math.PI) / 180;
  const [dx, dy] = shiftOf(`transform="${attributes.transform ?? ''}"`);
  const anchor = attributes['text-anchor'] ?? 'start';
  const along = anchor === 'middle' ? 0 : anchor === 'end' ? -width / 2 : width / 2;
  const across = down - height / 2;
  return {
    text,
    x: group[0] + dx + along * Math.cos(turn) - across * Math.sin(turn),
    y: group[1] + dy + along * Math.sin(turn) + across * Math.cos(turn),
    width,
    height,
    turn,
  };
}

function attributesOf(text: string): Record<string, string> {
  return Object.fromEntries(
    [...text.matchAll(/([\w-]+)="([^"]*)"/g)].map(([, name, value]) => [name!, value!]),
  );
}
function shiftOf(attributes: string): [number, number] {
  const found = /translate\(([-\d.e]+),([-\d.e]+)\)/.exec(attributes);
  return found === null ? [0, 0] : [Number(found[1]), Number(found[2])];
}
function added(a: [number, number], b: [number, number]): [number, number] {
  return [a[0] + b[0], a[1] + b[1]];
}
function unescaped(text: string): string {
  return text
    .replaceAll('&lt;', '<')
    .replaceAll('&gt;', '>')
    .replaceAll('&quot;', '"')
    .replaceAll('&amp;', '&');
}

/** Pairs of texts whose boxes overlap. */
export function overlaps(texts: readonly DrawnText[]): string[] {
  const found: string[] = [];
  texts.forEach((a, i) => {
    for (const b of texts.slice(i + 1)) if (boxesMeet(a, b)) found.push(`'${a.text}' on '${b.text}'`);
  });
  return found;
}

/** Two turned boxes overlap when no direction of their sides separates them (separating-axis theorem). */
function boxesMeet(a: DrawnText, b: DrawnText): boolean {
  for (const { turn } of [a, b]) {
    for (const side of [turn, turn + Math.PI / 2]) {
      const [ux, uy] = [Math.cos(side), Math.sin(side)];
      const distance = Math.abs((b.x - a.x) * ux + (b.y - a.y) * uy);
      if (distance >= reach(a, side) + reach(b, side)) return false;
    }
  }
  return true;
}

function reach({ width, height, turn }: DrawnText, direction: number): number {
  const along = Math.cos(direction - turn);
  const across = Math.sin(direction - turn);
  return (Math.abs(along) * width + Math.abs(across) * height) / 2;
}

/** Texts that reach beyond the picture. */
export function outside(texts: readonly DrawnText[], width: number, height: number): string[] {
  return texts
    .filter((text) => {
      const right = reach(text, 0);
      const down = reach(text, Math.PI / 2);
      return text.x < right || text.x > width - right || text.y < down || text.y > height - down;
    })
    .map(({ text }) => text);
}
