/** A worker that dies of every task. */
export default function die() {
  process.exit(7);
}
