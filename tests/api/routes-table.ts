/**
 * One line for each file of server/api: who may ask, what body it takes, which it refuses. A file without a line fails
 * the test of routes. Add a line with the file; the address, its parts and the method are read from the file's name.
 */
import { ulid } from 'ulid'
import type { Act } from '#shared/judging/roles'
import type { Role } from '#shared/schemas/lists'
import { PASSWORD } from './harness'

/** Real things of one studio, by the names that stand in addresses. */
export type Ids = Record<'class' | 'person' | 'lesson' | 'revision' | 'piece' | 'photo' | 'signOff' | 'invitation' | 'letter' | 'note' | 'name' | 'judgement', string>

export interface Line {
  /** `open`: anybody. `person`: who has come in. `member`: who has a place in a studio. Else the act their part must allow. */
  guard: 'open' | 'person' | 'member' | Act
  /** A body that is well formed; asked with one field more it is refused. */
  body?: (ids: Ids) => Record<string, unknown>
  /** Bodies that are refused, each with the fields that get a sentence. */
  refused?: [body: unknown, fields: string[]][]
  /** Bodies that name a thing of another studio: 404, as if it were not there. */
  strange?: (own: Ids, strange: Ids) => Record<string, unknown>[]
  /** Where another studio's thing is answered like one that is nowhere, but not with 404: by whom it is asked, and with what. */
  elsewhere?: { as: Role, status: number, body: (own: Ids, piece: string) => Record<string, unknown> }
  /** What stands after the question mark. */
  query?: string
  /** Sent instead of JSON. */
  raw?: { type: string, bytes: string }
}

const TABLET = ulid()
const HEAD = 'a'.repeat(64)
const PICTURE = { type: 'image/png', bytes: 'not a picture' }
const day = { termFrom: '2026-01-10', termTo: '2026-12-19' }
const judgement = (piece: string) => ({ id: ulid(), piece, n: 1, head: HEAD, seen: 'piece', outcome: 'kept', level: null, marks: {}, faults: [] })
const batch = (ids: Pick<Ids, 'piece' | 'person'>) => ({ tablet: TABLET, sentAt: new Date().toISOString(), events: [{ id: ulid(), piece: ids.piece, round: ulid(), tablet: TABLET, seq: 1, actor: ids.person, kind: 'piece.finished', v: 1, at: new Date().toISOString(), since: 0, body: {} }] })

export const ROUTES: Record<string, Line> = {
  'ready.get.ts': { guard: 'open' },
  'caught.get.ts': { guard: 'open' },

  'come-in/index.post.ts': { guard: 'open', body: () => ({ email: 'nobody@bench.example', password: PASSWORD }), refused: [[{}, ['email', 'password']], [{ email: 'no', password: '' }, ['email', 'password']], [{ email: 7, password: [] }, ['email', 'password']]] },
  'come-in/card.post.ts': { guard: 'open', body: () => ({ code: '2345-BCDF' }), refused: [[{}, ['code']], [{ code: ' ' }, ['code']], [{ code: 'x'.repeat(21) }, ['code']]] },
  'finished.post.ts': { guard: 'open' },
  'forgotten.post.ts': { guard: 'open', body: () => ({ email: 'nobody@bench.example' }), refused: [[{}, ['email']], [{ email: 'nobody' }, ['email']]] },
  'link.post.ts': { guard: 'open', body: () => ({ token: 'x'.repeat(43) }), refused: [[{}, ['token']], [{ token: '../..' }, ['token']]] },
  'reset.post.ts': { guard: 'open', refused: [[{}, ['token']], [{ token: 'short', password: PASSWORD }, ['token']]] },

  'me/index.get.ts': { guard: 'person' },
  'me/index.patch.ts': { guard: 'person', body: () => ({ hand: 'right' }), refused: [[{ hand: 'third', ground: 'sky', textSize: 99 }, ['hand', 'ground', 'textSize']], [{ textSize: 100.5 }, ['textSize']]] },
  'me/studio.post.ts': { guard: 'person', body: () => ({ studioId: ulid() }), refused: [[{}, ['studioId']], [{ studioId: 'mine' }, ['studioId']]] },
  'me/email.post.ts': { guard: 'person', body: () => ({ email: 'mine@bench.example' }), refused: [[{}, ['email']], [{ email: 'mine' }, ['email']]] },

  'people/index.get.ts': { guard: 'manage-people' },
  'people/index.post.ts': {
    guard: 'manage-people', body: () => ({ id: ulid(), name: 'Ida Stern', roles: ['apprentice'] }),
    refused: [[{}, ['id', 'name', 'roles']], [{ id: ulid(), name: ' ', roles: ['owner'], email: 'no', ageBand: 'old' }, ['name', 'roles', 'email', 'ageBand']], [{ id: ulid(), name: 'Ida', roles: [] }, ['roles']]],
    strange: (_own, strange) => [{ id: ulid(), name: 'Ida Stern', roles: ['apprentice'], classId: strange.class }, { id: strange.person, name: 'Ida Stern', roles: ['apprentice'] }],
  },
  'people/[person]/index.get.ts': { guard: 'manage-people' },
  'people/[person]/roles.post.ts': { guard: 'manage-people', body: () => ({ id: ulid(), role: 'instructor', act: 'given' }), refused: [[{}, ['id', 'role', 'act']], [{ id: 1, role: 'owner', act: 'take' }, ['id', 'role', 'act']]] },
  'people/[person]/leave.post.ts': { guard: 'manage-people' },
  'people/[person]/permissions.get.ts': { guard: 'see-pieces' },
  'people/[person]/permissions.post.ts': { guard: 'suspend', body: () => ({ id: ulid(), permission: 'flame', act: 'suspend', words: 'The flame was left alone.' }), refused: [[{}, ['id', 'permission', 'act']]] },
  'invitations/[invitation].delete.ts': { guard: 'manage-people' },
  'letters/index.get.ts': { guard: 'manage-people' },
  'letters/[letter]/again.post.ts': { guard: 'manage-people' },

  'classes/index.get.ts': { guard: 'see-classes' },
  'classes/index.post.ts': { guard: 'manage-classes', body: () => ({ id: ulid(), name: 'Friday', weekday: 5, ...day }), refused: [[{}, ['id', 'name', 'termFrom', 'termTo', 'weekday']], [{ id: ulid(), name: 'F', weekday: 5, termFrom: day.termTo, termTo: day.termFrom }, ['termTo']]] },
  'classes/[class]/index.get.ts': { guard: 'see-classes' },
  'classes/[class]/index.patch.ts': { guard: 'manage-classes', body: () => ({ weekday: 2 }), refused: [[{ weekday: 0, name: '' }, ['weekday', 'name']]] },
  'classes/[class]/people/index.post.ts': { guard: 'manage-classes', body: ids => ({ personId: ids.person }), refused: [[{}, ['personId']]], strange: (_own, strange) => [{ personId: strange.person }] },
  'classes/[class]/people/[person].delete.ts': { guard: 'manage-classes' },
  'classes/[class]/lessons/index.post.ts': { guard: 'manage-classes', body: ids => ({ id: ulid(), lessonId: ids.lesson }), refused: [[{}, ['id', 'lessonId']]], strange: (_own, strange) => [{ id: ulid(), lessonId: strange.lesson }] },
  'classes/[class]/lessons/[lesson].delete.ts': { guard: 'manage-classes' },
  'classes/[class]/cards.post.ts': { guard: 'give-cards', body: ids => ({ people: [ids.person] }), refused: [[{}, ['people']], [{ people: [], on: 'soon' }, ['people', 'on']]] },
  'classes/[class]/table.get.ts': { guard: 'see-classes' },

  'bench/home.get.ts': { guard: 'make-pieces' },
  'bench/lessons/[lesson].get.ts': { guard: 'make-pieces' },
  'bench/line/[piece].get.ts': { guard: 'member' },
  'bench/notes/[note]/read.post.ts': { guard: 'make-pieces' },
  'bench/room.get.ts': { guard: 'witness' },

  'pieces/[piece]/index.get.ts': { guard: 'member' },
  'pieces/[piece]/events.get.ts': { guard: 'member' },
  'pieces/[piece]/events.post.ts': { guard: 'make-pieces', body: batch, refused: [[{}, ['tablet', 'sentAt', 'events']], [{ tablet: ulid(), sentAt: 'now', events: [] }, ['sentAt', 'events']]], elsewhere: { as: 'apprentice', status: 422, body: (own, piece) => batch({ person: own.person, piece }) } },
  'pieces/[piece]/witness.post.ts': { guard: 'witness', body: () => ({ id: ulid(), turn: 'cut', how: 'there' }), refused: [[{}, ['id', 'turn', 'how']]] },
  'pieces/[piece]/release.post.ts': { guard: 'witness', body: () => ({ id: ulid(), turn: 'cut', says: 'The question was wrong.' }), refused: [[{}, ['id', 'turn', 'says']], [{ id: ulid(), turn: 'cut', says: ' ' }, ['says']]] },
  'pieces/[piece]/look.post.ts': { guard: 'witness', body: () => ({ id: ulid() }), refused: [[{}, ['id']]] },
  'photos/[photo].get.ts': { guard: 'member' },
  'photos/[photo].put.ts': { guard: 'make-pieces', raw: PICTURE },

  'record/[person].get.ts': { guard: 'member' },

  'looks/index.get.ts': { guard: 'see-pieces' },
  'looks/count.get.ts': { guard: 'see-pieces' },
  'looks/[piece].get.ts': { guard: 'see-pieces' },
  'judgements/index.post.ts': { guard: 'judge', body: ids => judgement(ids.piece), refused: [[{}, ['id', 'piece', 'n', 'head', 'seen', 'outcome']]], strange: (_own, strange) => [judgement(strange.piece)] },
  'sign-offs/waiting.get.ts': { guard: 'sign' },
  'sign-offs/index.post.ts': { guard: 'sign', body: ids => ({ password: PASSWORD, items: [{ id: ulid(), judgements: [ids.judgement], level: 2, n: 1, head: HEAD }] }), refused: [[{}, ['password', 'items']], [{ password: '', items: [] }, ['password', 'items']]] },
  'sign-offs/founding.get.ts': { guard: 'found' },
  'sign-offs/founding.post.ts': {
    guard: 'found', body: ids => ({ id: ulid(), person: ids.person, lesson: ids.lesson, password: PASSWORD }), refused: [[{}, ['id', 'person', 'lesson', 'password']]],
    strange: (own, strange) => [{ id: ulid(), person: strange.person, lesson: own.lesson, password: PASSWORD }, { id: ulid(), person: own.person, lesson: strange.lesson, password: PASSWORD }],
  },
  'sign-offs/[signOff]/index.get.ts': { guard: 'member' },
  'sign-offs/[signOff]/second-name.post.ts': { guard: 'sign', body: () => ({ id: ulid(), password: PASSWORD }), refused: [[{}, ['id', 'password']]] },

  'lessons/index.get.ts': { guard: 'see-lessons' },
  'lessons/index.post.ts': { guard: 'write-lessons', body: () => ({ id: ulid(), title: 'Hand twist', craft: 'wire' }), refused: [[{}, ['id', 'title', 'craft']], [{ id: ulid(), title: '!', craft: 'pottery' }, ['title', 'craft']]] },
  'lessons/[lesson]/index.get.ts': { guard: 'see-lessons' },
  'lessons/[lesson]/draft.get.ts': { guard: 'write-lessons' },
  'lessons/[lesson]/draft.put.ts': { guard: 'write-lessons', body: () => ({ etag: ulid(), source: '# x' }), refused: [[{}, ['etag', 'source']]] },
  'lessons/[lesson]/use.get.ts': { guard: 'put-into-use' },
  'lessons/[lesson]/use.post.ts': { guard: 'put-into-use', body: () => ({ id: ulid(), etag: ulid(), effect: 'words', note: '' }), refused: [[{}, ['id', 'etag', 'effect', 'note']]] },
  'lessons/[lesson]/withdraw.post.ts': { guard: 'put-into-use', body: ids => ({ id: ulid(), revision: ids.revision, danger: false }), refused: [[{}, ['id', 'revision', 'danger']]] },
  'lessons/[lesson]/back-in-use.post.ts': { guard: 'put-into-use', body: ids => ({ id: ulid(), revision: ids.revision }), refused: [[{}, ['id', 'revision']]] },
  'lessons/[lesson]/put-away.post.ts': { guard: 'put-into-use', body: () => ({ away: true }), refused: [[{}, ['away']], [{ away: 'yes' }, ['away']]] },
  'lessons/[lesson]/pictures/index.get.ts': { guard: 'write-lessons' },
  'lessons/[lesson]/pictures/index.post.ts': { guard: 'write-lessons', raw: PICTURE, query: '?name=bend.jpg' },
  'lessons/[lesson]/pictures/[name].get.ts': { guard: 'see-lessons' },
  'lessons/[lesson]/pictures/[name].delete.ts': { guard: 'write-lessons' },
  'pictures/[revision]/[name].get.ts': { guard: 'member' },
}
