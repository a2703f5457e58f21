/** Lengths of wire bent into loops and coils. All lengths mm; the neutral axis is taken at the middle of the wire. */

/** One full turn of wire on a mandrel: L = pi (D + d). Inside and wire > 0. Source: mensuration; neutral axis at the centre of the wire. */
export function ring(inside: number, wire: number): number {
  return Math.PI * (inside + wire)
}

/**
 * `turns` of wire, each touching the last, round a core: L = N sqrt((pi (c + d))^2 + d^2). Turns >= 0, core and wire > 0.
 * Source: length of a helix of pitch d.
 */
export function coil(turns: number, core: number, wire: number): number {
  return turns * Math.hypot(Math.PI * (core + wire), wire)
}
