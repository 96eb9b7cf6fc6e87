/** Worker threads run from the build, also when the main thread runs from source, as in tests. */
export function builtFile(name: 'worker' | 'copy-worker'): string {
  const folder = import.meta.url.endsWith('.ts') ? '../../.build/engine/' : './';
  return new URL(`${folder}${name}.js`, import.meta.url).href;
}
