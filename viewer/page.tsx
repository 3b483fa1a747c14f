/** The whole page in the winder's order: describe, solve, look, change. */
export function Page() {
  return <main />;
}
