import type { MassPoint } from './geometry/burn-path.ts';
import type { ChartHeading } from './sheet.ts';

/** One loading case: its states from the fullest to the emptiest. */
export interface LoadingCase {
  readonly label: string;
  /** States at every break of the burn sequence, in that order; one state when nothing burns. CG in % MAC, mass in the unit of the mass title. */
  readonly states: readonly MassPoint[];
}

/** A limit of the CG against mass. */
export interface LoadingLimit {
  /** `control limit: elevator travel at the stall`, `aft limit: margin at least 5 %` */
  readonly label: string;
  readonly forbidden: 'forward' | 'aft';
  /** Points of the line, CG [% MAC]; a single one means the same CG at every mass. */
  readonly line: readonly MassPoint[];
}

export interface LoadingDiagramData {
  readonly heading: ChartHeading;
  /** With unit: `Mass [kg]`. */
  readonly massTitle: string;
  /** The second scale, along the top. `leadingEdge` (of the MAC) and `chord` (the MAC) in the unit of its title. */
  readonly station: { readonly title: string; readonly leadingEdge: number; readonly chord: number };
  readonly cases: readonly LoadingCase[];
  readonly limits: readonly LoadingLimit[];
  /** In the unit of the mass title. */
  readonly greatestMass?: number;
  readonly empty: MassPoint;
}
