/** Numbered bead cord (silk, nylon): thickness in mm by number. End points from a bead-shop article, the rest a common trade chart from memory; makers differ by 0.05 to 0.1. */
const CORD: Record<number, number> = { 0: 0.3, 1: 0.35, 2: 0.45, 3: 0.5, 4: 0.6, 5: 0.65, 6: 0.7, 7: 0.75, 8: 0.8, 10: 0.9, 12: 0.98, 14: 1.02, 16: 1.05 }

/** Thickness in mm of a cord size, written `4` or `size 4`; null for a number that is not made. */
export function cordToMm(size: string): number | null {
  const number = /^(?:size )?(\d{1,2})$/.exec(size.trim().toLowerCase())?.[1]
  return number === undefined ? null : CORD[Number(number)] ?? null
}

/** The cord size of a thickness in mm, as `size 4`, or null when none is within 0.005 mm. */
export function cordNamed(mm: number): string | null {
  const found = Object.entries(CORD).find(([, thick]) => Math.abs(thick - mm) < 0.005)
  return found ? `size ${found[0]}` : null
}
