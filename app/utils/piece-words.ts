import type { PieceStatus } from '#shared/schemas/lists'

/** Where a piece is, in the words of the bench. */
export const PIECE_WORDS: Record<PieceStatus, string> = { 'at-bench': 'at the bench', 'finished': 'waits for a look', 'judged': 'judged', 'put-away': 'put away' }
