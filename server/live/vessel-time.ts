/** A time that goes so many times as fast as the clock, from an instant on, ms since 1970-01-01T00:00:00Z. */
export function vesselTime(fromMs: number, speed: number): () => number {
  const began = performance.now();
  return () => fromMs + (performance.now() - began) * speed;
}
