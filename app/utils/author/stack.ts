/** Where notes stand in a margin. */

export interface Leaf {
  /** Where its line is, in pixels from the top. */
  at: number
  height: number
}

/** The top of each note: beside its line where there is room, else right under the note before. The order is kept. */
export function stackNotes(leaves: readonly Leaf[], gap: number): number[] {
  let free = 0
  return leaves.map(({ at, height }) => {
    const top = Math.max(at, free)
    free = top + height + gap
    return top
  })
}
