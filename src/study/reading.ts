import type { FaultList } from './fault-list.ts';
import { findInputDefinition, type InputDefinition } from './inputs.ts';
import { isFault, parseQuantity, type Quantity, type QuantityKind } from './quantities.ts';
import type { SourceNode, Span } from './source.ts';
import { firstOf, valueIn } from './source.ts';
import type { Assumption, CgKind } from './study.ts';

/**
 * What has been read of a study so far. A number with a fault is entered as NaN, so that later checks
 * know it was given and say nothing about it; a study with faults is never handed out.
 */
export class Reading {
  readonly inputs = new Map<string, number>();
  /** Where each given number stands, and the key of each assumed one's map. */
  readonly spans = new Map<string, Span>();
  readonly assumptions: Assumption[] = [];

  constructor(readonly faults: FaultList) {}

  /** Reads one quantity; its fault is told and NaN stands for it. Undefined where no scalar stands. */
  quantity(node: SourceNode | undefined, kind: QuantityKind, label: string): Quantity | undefined {
    if (node?.kind !== 'scalar' || node.value === null || typeof node.value === 'boolean') return undefined;
    const read = parseQuantity(node.text, kind, label);
    if (!isFault(read)) return read;
    this.faults.add(read.code, node.span, read.found, read.remedy);
    return undefined;
  }

  /**
   * Reads the number of one key into the inputs. Left out, it takes its customary value where the
   * table has one.
   * @returns whether the study gives it
   */
  take(map: SourceNode, key: string, path: string, cgKind?: CgKind): boolean {
    const definition = findInputDefinition(path, cgKind)!;
    const node = valueIn(map, key);
    if (!node) {
      this.#assumeDefault(definition, map);
      return false;
    }
    this.enter(path, node, definition);
    return true;
  }

  enter(path: string, node: SourceNode, definition: InputDefinition): void {
    this.inputs.set(path, this.quantity(node, definition, path)?.si ?? Number.NaN);
    this.spans.set(path, node.span);
  }

  #assumeDefault(definition: InputDefinition, map: SourceNode): void {
    const { path, whenLeftOut } = definition;
    if (whenLeftOut) this.assume(path, whenLeftOut.value, whenLeftOut.source, firstOf(map));
  }

  /** Enters a number that the study leaves out. */
  assume(path: string, value: number, source: string, span: Span): void {
    this.inputs.set(path, value);
    this.spans.set(path, span);
    this.assumptions.push({ path, value, source });
  }
}
