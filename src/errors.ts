/**
 * The closed list of things that can go wrong, and the three ways they end:
 * the user's mistake (exit 2), the machine's fault (exit 1), a bug (exit 70).
 */

/** Codes of faults found in a study file. Each has a test that asserts code and place. */
export const studyFaultCodes = {
  UNREADABLE_YAML: 'the file is not well-formed YAML',
  ALIAS_REFUSED: 'YAML anchors and aliases are not used in studies',
  DUPLICATE_KEY: 'one key written twice in a map',
  UNKNOWN_KEY: 'a key that studies do not have',
  MISSING_KEY: 'a key that is needed is not there',
  WRONG_TYPE: 'a text, number, list or map stands where another is wanted',
  UNKNOWN_WORD: 'a word that is not one of those offered',
  MISSING_UNIT: 'a dimensional number without its unit',
  UNKNOWN_UNIT: 'a unit that is not known',
  WRONG_DIMENSION: 'a unit of the wrong kind',
  OUT_OF_RANGE: 'a number outside what is physically possible',
  OVERDETERMINED: 'more numbers given than are free',
  UNDERDETERMINED: 'too few numbers given to settle a shape',
  DERIVED_VARIED: 'a number that follows from others is varied',
  NOT_A_NUMBER_OF_THE_STUDY: 'a path that names no number of this study',
  EMPTY_AXIS: 'an axis without a value',
  STEP_MISSES_END: 'a step that does not land on the end of its range',
  DUPLICATE_VALUE: 'an axis with the same value twice',
  DUPLICATE_AXIS: 'one number varied by two axes',
  TIED_LENGTHS_DIFFER: 'tied numbers with unequal counts of values',
  TOO_MANY_COMBINATIONS: 'more combinations than can be numbered or finished',
  UNKNOWN_FIGURE: 'a figure that this study does not have',
  UNKNOWN_SECTION: 'an aerofoil section that is not in the shipped table',
  UNKNOWN_CONDITION: 'a flight condition that is not listed',
  BAND_REVERSED: 'a lower edge above its upper edge',
  CG_REVERSED: 'a forward CG aft of the aft CG',
  TAIL_AHEAD_OF_WING: 'a tail ahead of the wing, which screening refuses',
  TAIL_BEYOND_BODY: 'a tail beyond the end of the body, without a boom',
  STATIONS_NOT_ASCENDING: 'body stations that do not run aft',
  DUPLICATE_NAME: 'one name used twice',
  BAD_NAME: 'a name with signs that names do not have',
  CG_TWICE: 'a stated CG range beside a loading, from which it follows',
  UNKNOWN_ITEM: 'a loading case with an item that is not listed',
  ITEM_IN_NO_CASE: 'an item of the loading that no case carries',
} as const;

export type StudyFaultCode = keyof typeof studyFaultCodes;

/** One fault in a study: where, what was found, what to do. Lines and columns count from 1. */
export interface StudyFault {
  readonly code: StudyFaultCode;
  readonly line: number;
  readonly column: number;
  /** Length of the marked text on that line, at least 1. */
  readonly length: number;
  readonly found: string;
  readonly remedy: string;
}

/** All the faults of one study file at once. */
export class StudyError extends Error {
  override readonly name = 'StudyError';
  constructor(
    readonly file: string,
    readonly text: string,
    readonly faults: readonly StudyFault[],
  ) {
    super(`${faults.length} fault${faults.length === 1 ? '' : 's'} in ${file}`);
  }
}

/** Codes of faults found in a table of flight-test data (exit 2). */
export const dataFaultCodes = {
  NOT_UTF8: 'a table that is not UTF-8 text',
  UNREADABLE_CSV: 'quotes that do not match',
  WRONG_SEPARATOR: 'cells that are not separated by commas',
  NO_POINTS: 'a table without a flown point',
  UNKNOWN_COLUMN: 'a column that flight-test data do not have',
  DUPLICATE_COLUMN: 'one quantity in two columns',
  MISSING_COLUMN: 'a column that is needed is not there',
  WRONG_CELL_COUNT: 'a row with more or fewer cells than the header',
  MISSING_CELL: 'an empty cell where a value is needed',
  DECIMAL_COMMA: 'a decimal comma',
  NOT_A_NUMBER: 'a text where a number is wanted',
  OUT_OF_RANGE: 'a number outside what is physically possible',
  DUPLICATE_POINT: 'one name for two points',
} as const;
export type DataFaultCode = keyof typeof dataFaultCodes;

/** One fault in a table of data: where, what was found, what to do. Lines and columns count from 1. */
export interface DataFault {
  readonly code: DataFaultCode;
  readonly line: number;
  readonly column: number;
  /** Length of the marked text on that line, at least 1. */
  readonly length: number;
  readonly found: string;
  readonly remedy: string;
}

/** All the faults of one table at once. */
export class DataError extends Error {
  override readonly name = 'DataError';
  constructor(
    readonly file: string,
    readonly text: string,
    readonly faults: readonly DataFault[],
  ) {
    super(`${faults.length} fault${faults.length === 1 ? '' : 's'} in ${file}`);
  }
}

/** Codes of other mistakes a user can make (exit 2). */
export const usageFaultCodes = {
  BAD_ARGUMENT: 'an argument that cannot be used',
  NO_SUCH_FILE: 'a file that is not there',
  NO_SUCH_RUN: 'a folder that holds no run',
  NO_SUCH_COMBINATION: 'a combination number beyond the study, or skipped',
  RUN_NOT_FINISHED: 'a run that is not finished',
  OTHER_STUDY_IN_FOLDER: 'a run folder that holds another study',
  FILE_EXISTS: 'a file that would be overwritten',
} as const;
export type UsageFaultCode = keyof typeof usageFaultCodes;

/** A mistake in the arguments or the order of commands. */
export class UsageError extends Error {
  override readonly name = 'UsageError';
  constructor(
    readonly code: UsageFaultCode,
    message: string,
    readonly remedy: string,
  ) {
    super(message);
  }
}

/** Codes of faults of the machine (exit 1): nothing finished is lost, and the text says how to go on. */
export const machineFaultCodes = {
  DISK_TOO_SMALL: 'less room on the disk than the run needs',
  DISK_FULL: 'the disk filled up while writing',
  NO_PERMISSION: 'a folder that may not be written',
  WRITE_FAILED: 'the machine refused to write',
  READ_FAILED: 'the machine refused to read',
  PART_LOST: 'a part whose worker died twice',
} as const;
export type MachineFaultCode = keyof typeof machineFaultCodes;

/** A fault of the machine, not of the study. */
export class MachineError extends Error {
  override readonly name = 'MachineError';
  constructor(
    readonly code: MachineFaultCode,
    message: string,
    readonly remedy: string,
  ) {
    super(message);
  }
}

export const exitCodes = { done: 0, machine: 1, user: 2, bug: 70, interrupted: 130 } as const;
