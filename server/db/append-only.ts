/** Tables on which the application's account has no UPDATE or DELETE, and whose triggers refuse both to everyone. */
export const APPEND_ONLY: readonly string[] = [
  'membership_roles', 'settings', 'revisions', 'revision_acts', 'revision_pictures', 'revision_reads', 'piece_events', 'set_aside_events',
  'judgements', 'marks', 'sign_offs', 'sign_off_pieces', 'permission_acts', 'register',
]
