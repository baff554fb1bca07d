/**
 * A small seeded generator (mulberry32, public domain algorithm): the same seed gives the same draws everywhere,
 * so that a band can be checked again. Returns numbers in [0, 1).
 */
export function seededUniform(seed: number): () => number {
  let state = seed >>> 0
  return () => {
    state = (state + 0x6d2b79f5) >>> 0
    let t = state
    t = Math.imul(t ^ (t >>> 15), t | 1)
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61)
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296
  }
}

/** Standard normal draws by the Box-Muller transform (Annals of Mathematical Statistics, 1958). */
export function seededNormals(seed: number, count: number): Float64Array {
  const uniform = seededUniform(seed)
  const normals = new Float64Array(count)
  for (let i = 0; i < count; i += 2) {
    const radius = Math.sqrt(-2 * Math.log(1 - uniform()))
    const angle = 2 * Math.PI * uniform()
    normals[i] = radius * Math.cos(angle)
    if (i + 1 < count) normals[i + 1] = radius * Math.sin(angle)
  }
  return normals
}

/** A 32-bit seed from a text (FNV-1a). */
export function seedOf(text: string): number {
  let hash = 0x811c9dc5
  for (let i = 0; i < text.length; i++) hash = Math.imul(hash ^ text.charCodeAt(i), 0x01000193)
  return hash >>> 0
}
