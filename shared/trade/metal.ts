/** Metals as data: density in g/cm3 with the range it may have and where it is from. */
export interface Metal { name: string, density: number, from: number, to: number, source: string }

export const METALS = [
  { name: 'fine silver', density: 10.49, from: 10.49, to: 10.5, source: 'element density compilation (CRC)' },
  { name: 'sterling silver', density: 10.36, from: 10.3, to: 10.4, source: 'alloy datasheet; mixture rule of 92.5 Ag, 7.5 Cu gives 10.36' },
  { name: 'copper', density: 8.96, from: 8.89, to: 8.96, source: 'element density compilation' },
  { name: 'brass', density: 8.53, from: 8.4, to: 8.75, source: 'datasheet of cartridge brass 70/30, C26000' },
  { name: 'red brass', density: 8.75, from: 8.7, to: 8.8, source: 'datasheets of 85/15, C23000' },
  { name: 'phosphor bronze', density: 8.86, from: 8.8, to: 8.9, source: 'datasheet of C51000' },
  { name: 'nickel silver', density: 8.73, from: 8.1, to: 8.73, source: 'by composition; C75200 8.73, from memory' },
  { name: 'pure gold', density: 19.3, from: 19.3, to: 19.32, source: 'element density compilation' },
  { name: '18 ct yellow gold', density: 15.5, from: 15.2, to: 15.9, source: 'published range; by mixture 15.45 to 15.59' },
  { name: '9 ct yellow gold', density: 11.2, from: 10.9, to: 12.7, source: 'published range; by mixture 11.2' },
  { name: 'platinum', density: 21.45, from: 21.4, to: 21.45, source: 'several handbooks collated' },
  { name: 'stainless steel', density: 8, from: 7.9, to: 8, source: 'datasheet of 316L' },
] as const satisfies readonly Metal[]
export type MetalName = (typeof METALS)[number]['name']

export const metalNamed = (name: string): Metal | null => METALS.find(metal => metal.name === name) ?? null

/** Mass in g of a length (mm) of round wire (mm across): pi d^2 / 4 x L x density / 1000. Null for a metal not in the list. */
export function wireMass(metal: string, wire: number, length: number): number | null {
  const known = metalNamed(metal)
  return known ? Math.PI * wire * wire / 4 * length * known.density / 1000 : null
}
