import { and, eq } from 'drizzle-orm'
import { ulid } from 'ulid'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Db } from '#server/db/client'
import { register } from '#server/db/schema/judging'
import { people } from '#server/db/schema/people'
import { membershipRoles, memberships } from '#server/db/schema/studio'
import { verify } from '#server/services/register'
import { addPerson, asPerson, letterTo, openStudio, openTest, PASSWORD, saysOf, secretIn, type TestStudio } from './harness'
import { ClassSchema, MeSchema, PeopleSchema } from './shapes'

let db: Db
let close: () => Promise<void>
let studio: TestStudio
beforeAll(async () => {
  ({ db, close } = openTest())
  studio = await openStudio(db)
})
afterAll(() => close())

const acts = async (personId: string) => (await db.select({ act: register.act, body: register.body }).from(register).where(and(eq(register.studioId, studio.id), eq(register.objectId, personId)))).map(row => `${row.act} ${row.body}`)

describe('parts', () => {
  it('are given and ended in one: the act, the folded set and the register', async () => {
    const owen = await studio.as('owen')
    const person = studio.idOf('dilys')
    const id = ulid()
    const give = () => owen.post(`/api/people/${person}/roles`, { id, role: 'manager', act: 'given' })
    expect((await give()).body).toEqual({ roles: ['instructor', 'manager'] })
    expect((await owen.post(`/api/people/${person}/roles`, { id: ulid(), role: 'manager', act: 'ended' })).body).toEqual({ roles: ['instructor'] })
    // A repeat of the first press, late: it is done already, and changes nothing now.
    expect((await give()).body).toEqual({ roles: ['instructor'] })
    expect((await db.select({ act: membershipRoles.act }).from(membershipRoles).where(and(eq(membershipRoles.studioId, studio.id), eq(membershipRoles.personId, person)))).map(row => row.act)).toEqual(['given', 'ended'])
    expect(await acts(person)).toEqual(expect.arrayContaining(['role-given {"role":"manager"}', 'role-ended {"role":"manager"}']))
    expect((await verify(db, studio.id)).broken).toBeNull()
  })

  it('never leave a studio without a manager, not even when two end each other at once', async () => {
    const owen = await studio.as('owen')
    const last = await owen.post(`/api/people/${studio.idOf('owen')}/roles`, { id: ulid(), role: 'manager', act: 'ended' })
    expect([last.status, saysOf(last)]).toEqual([422, 'A studio keeps at least one manager. Make someone else a manager first.'])
    expect((await owen.post(`/api/people/${studio.idOf('owen')}/leave`)).status).toBe(422)

    for (let round = 0; round < 4; round++) {
      const pair = await openStudio(db)
      await db.update(memberships).set({ roles: ['manager'] }).where(and(eq(memberships.studioId, pair.id), eq(memberships.personId, pair.idOf('ruth'))))
      const [one, two] = [await pair.as('owen'), await pair.as('ruth')]
      await Promise.all([
        one.post(`/api/people/${pair.idOf('ruth')}/roles`, { id: ulid(), role: 'manager', act: 'ended' }),
        two.post(`/api/people/${pair.idOf('owen')}/roles`, { id: ulid(), role: 'manager', act: 'ended' }),
      ])
      const rows = await db.select({ roles: memberships.roles }).from(memberships).where(eq(memberships.studioId, pair.id))
      expect(rows.filter(row => row.roles.includes('manager'))).toHaveLength(1)
    }
  })

  it('cannot be taken by a body that asks for more', async () => {
    const owen = await studio.as('owen')
    const body = { id: ulid(), name: 'Vic Hale', roles: ['apprentice'] }
    for (const extra of [{ studioId: studio.id }, { personId: studio.idOf('owen') }, { passwordHash: 'x' }, { trailNo: 1 }]) {
      expect((await owen.post('/api/people', { ...body, ...extra })).status).toBe(400)
    }
  })
})

describe('a person', () => {
  it('of another studio cannot be taken in by their id', async () => {
    const other = await openStudio(db)
    const owen = await studio.as('owen')
    const answer = await owen.post('/api/people', { id: other.idOf('amy'), name: 'Amy Brandt', roles: ['apprentice'] })
    expect(answer.status).toBe(404)
    expect(PeopleSchema.parse((await owen.get('/api/people')).body).people.map(person => person.id)).not.toContain(other.idOf('amy'))
  })

  it('who joined twice by one press is one', async () => {
    const owen = await studio.as('owen')
    const body = { id: ulid(), name: 'Bo Lind', roles: ['apprentice'] }
    const answers = await Promise.all([owen.post('/api/people', body), owen.post('/api/people', body)])
    expect(answers.map(answer => answer.status)).toEqual([201, 201])
    expect((await db.select({ id: memberships.id }).from(memberships).where(eq(memberships.personId, body.id)))).toHaveLength(1)
    expect((await acts(body.id)).filter(act => act.startsWith('person-joined'))).toHaveLength(1)
  })

  it('who leaves keeps the record, loses the parts at once, and can come back', async () => {
    const owen = await studio.as('owen')
    const email = `leaver.${studio.id.toLowerCase()}@bench.example`
    const { id } = await addPerson(db, studio.id, { name: 'Lea Varn', roles: ['apprentice'], email })
    const lea = await asPerson(email)
    expect((await lea.get('/api/bench/home')).status).toBe(200)
    expect((await owen.post(`/api/people/${id}/leave`)).status).toBe(200)
    expect((await owen.post(`/api/people/${id}/leave`)).status).toBe(200)
    expect((await lea.get('/api/bench/home')).status).toBe(403)
    expect(MeSchema.parse((await lea.get('/api/me')).body)).toMatchObject({ studio: null, roles: [] })
    expect(await acts(id)).toEqual(['role-ended {"role":"apprentice"}', 'person-left {}'])
    const list = PeopleSchema.parse((await owen.get('/api/people')).body).people
    expect(list.find(person => person.id === id)?.leftAt).not.toBeNull()
    expect(list.at(-1)?.leftAt).not.toBeNull()

    expect((await owen.post('/api/people', { id: ulid(), name: 'Lea Varn', email, roles: ['instructor'] })).status).toBe(201)
    expect((await lea.post('/api/reset', { token: secretIn(await letterTo(email)), password: PASSWORD })).status).toBe(200)
    expect(MeSchema.parse((await lea.get('/api/me')).body).roles).toEqual(['instructor'])
  })

  it('has a page with parts, who gave them, and classes', async () => {
    const owen = await studio.as('owen')
    const id = ulid()
    await owen.post('/api/people', { id, name: 'Cy Moss', roles: ['apprentice'], classId: studio.world.classId })
    expect((await owen.get(`/api/people/${id}`)).body).toMatchObject({ name: 'Cy Moss', roles: ['apprentice'], acts: [{ role: 'apprentice', act: 'given', by: 'Owen Tait' }], classes: [{ name: 'Tuesday evening', untilOn: null }] })
  })
})

describe('classes', () => {
  it('are made once by one press, changed, filled and emptied', async () => {
    const owen = await studio.as('owen')
    const body = { id: ulid(), name: 'Saturday morning', termFrom: '2026-01-10', termTo: '2026-12-19', weekday: 6 }
    expect([(await owen.post('/api/classes', body)).status, (await owen.post('/api/classes', body)).status]).toEqual([201, 201])
    expect((await owen.ask('PATCH', `/api/classes/${body.id}`, { name: 'Saturday bench' })).body).toMatchObject({ name: 'Saturday bench', weekday: 6 })
    expect((await owen.ask('PATCH', `/api/classes/${body.id}`, { termTo: '2025-01-01' })).status).toBe(422)
    expect((await owen.get(`/api/classes/${body.id}`)).body).toMatchObject({ termTo: '2026-12-19' })

    const read = async () => ClassSchema.parse((await owen.get(`/api/classes/${body.id}`)).body)
    const amy = studio.idOf('amy')
    for (let i = 0; i < 2; i++) expect((await owen.post(`/api/classes/${body.id}/people`, { personId: amy })).status).toBe(201)
    expect((await read()).people.map(person => person.id)).toEqual([amy])
    expect((await owen.ask('DELETE', `/api/classes/${body.id}/people/${amy}`)).status).toBe(200)
    expect((await read()).people).toEqual([])
    await owen.post(`/api/classes/${body.id}/people`, { personId: amy })
    expect((await read()).people.map(person => person.id)).toEqual([amy])

    const lessonId = studio.world.lessonId
    for (let i = 0; i < 2; i++) expect((await owen.post(`/api/classes/${body.id}/lessons`, { id: ulid(), lessonId })).status).toBe(201)
    expect((await read()).lessons.map(lesson => lesson.id)).toEqual([lessonId])
    expect((await owen.ask('DELETE', `/api/classes/${body.id}/lessons/${lessonId}`)).status).toBe(200)
    expect((await read()).lessons).toEqual([])
  })

  it('take neither people nor lessons of another studio', async () => {
    const other = await openStudio(db)
    const owen = await studio.as('owen')
    const classId = studio.world.classId
    expect((await owen.post(`/api/classes/${classId}/people`, { personId: other.idOf('amy') })).status).toBe(404)
    expect((await owen.post(`/api/classes/${classId}/lessons`, { id: ulid(), lessonId: other.world.lessonId })).status).toBe(404)
    expect((await owen.post('/api/people', { id: ulid(), name: 'Al Dean', roles: ['apprentice'], classId: other.world.classId })).status).toBe(404)
    expect((await owen.post('/api/classes', { id: other.world.classId, name: 'Mine now', termFrom: '2026-01-10', termTo: '2026-12-19', weekday: 6 })).status).toBe(201)
    const theirs = await other.as('owen')
    expect(ClassSchema.parse((await theirs.get(`/api/classes/${other.world.classId}`)).body).name).toBe('Tuesday evening')
  })

  it('say what is wrong with a class, field by field', async () => {
    const owen = await studio.as('owen')
    const answer = await owen.post('/api/classes', { id: ulid(), name: ' ', termFrom: '2026-13-40', termTo: 'soon', weekday: 8 })
    expect(answer.status).toBe(400)
    expect(answer.body).toMatchObject({ data: { fieldErrors: { name: ['Missing: name.'], termFrom: ['A day, as 2026-09-08.'], termTo: ['A day, as 2026-09-08.'], weekday: ['7 or less.'] } } })
  })
})

describe('people of two studios', () => {
  it('are one person with one name, and each studio sees its own', async () => {
    const other = await openStudio(db)
    const [row] = await db.select({ email: people.email }).from(people).where(eq(people.id, studio.idOf('amy')))
    expect(row?.email).toBe(studio.emailOf('amy'))
    const list = PeopleSchema.parse((await (await other.as('owen')).get('/api/people')).body)
    expect(list.people.map(person => person.id)).not.toContain(studio.idOf('amy'))
    expect(list.people).toHaveLength(7)
  })
})
