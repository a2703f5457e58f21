/** A lane for each place along a line, in order, so that no two in one lane are nearer than `gap`; lane 0 first. */
export function lanesOf(places: readonly number[], gap: number): number[] {
  const ends: number[] = []
  return places.map((place) => {
    const lane = ends.findIndex(end => place - end >= gap)
    const chosen = lane < 0 ? ends.length : lane
    ends[chosen] = place
    return chosen
  })
}
