import { studyJsonSchema } from '../study/schema.ts';

/** Prints the JSON Schema of study files. */
export async function schema(): Promise<void> {
  process.stdout.write(`${JSON.stringify(studyJsonSchema(), null, 2)}\n`);
}
