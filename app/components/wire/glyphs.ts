/** The marks of the one motif, small, for tables and lists. Shape and number carry the meaning; colour only helps. */
export const GLYPHS = ['bare', 'at', 'waits', 'back', 'signed', 'once', 'lapsed', 'suspended', 'due', 'appeal', 'goods', 'closed'] as const
export type Glyph = (typeof GLYPHS)[number]

/** What each mark says aloud. */
export const GLYPH_SAYS: Record<Glyph, string> = {
  bare: 'not begun', at: 'at the bench', waits: 'waits for a look', back: 'sent back', signed: 'signed', once: 'one signature', lapsed: 'lapsed', suspended: 'suspended', due: 'refresh due', appeal: 'appeal', goods: 'customer’s goods',
  closed: 'not open yet',
}
