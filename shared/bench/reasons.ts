/** Why an event is not taken. */
export const REASONS = ['unknown-piece', 'begun-already', 'no-plan', 'not-the-maker', 'maker-only', 'not-an-instructor', 'own-work', 'unknown-turn', 'not-there-yet', 'hold-not-passed',
  'reading-missing', 'photo-missing', 'check-missing', 'unknown-ask', 'unknown-answer', 'unknown-photo', 'unknown-key', 'not-done', 'turns-left', 'closing-left', 'not-finished'] as const
export type Reason = (typeof REASONS)[number]

/** Each reason as a sentence for the person at the bench. */
export const REASON_SAYS: Record<Reason, string> = {
  'unknown-piece': 'This piece is not known here yet.', 'begun-already': 'This piece has begun already.', 'no-plan': 'With these sizes there are no steps to do.',
  'not-the-maker': 'This is another person’s piece.', 'maker-only': 'Only the maker says this.', 'not-an-instructor': 'An instructor of this studio says this.', 'own-work': 'Nobody looks at their own work.',
  'unknown-turn': 'This step is not in the piece.', 'not-there-yet': 'Steps before this one are still to be done.', 'hold-not-passed': 'The hold point before this step is not answered yet.',
  'reading-missing': 'A measure of this step is still to be taken.', 'photo-missing': 'A photo of this step is still to be taken.', 'check-missing': 'A question of this step is still to be answered.',
  'unknown-ask': 'This step does not ask that.', 'unknown-answer': 'This is no answer to that question.', 'unknown-photo': 'That photo was not taken on this piece.', 'unknown-key': 'The lesson has nothing of that name.',
  'not-done': 'This step is not done yet, so it cannot be made again.', 'turns-left': 'Steps are left to do.', 'closing-left': 'The closing list is not cleared yet.', 'not-finished': 'This piece is not finished yet.',
}
