/** Says who may come into the demo. */
import { CLASSES, DEMO_PASSWORD, emailOf, STAFF } from '../server/db/seed/people'

const line = (key: string, name: string, what: string) => `  ${emailOf(key).padEnd(28)} ${name}, ${what}`
process.stdout.write([
  'The demo studio is Tallow Yard Bench School. Everyone’s password is: ' + DEMO_PASSWORD,
  ...STAFF.map(person => line(person.key, person.name, person.roles.join(', '))),
  ...CLASSES.flatMap(one => one.people.map(person => line(person.key, person.name, `apprentice, ${one.name}`))), 'Mail is caught here, and can be read at /mail.',
].join('\n') + '\n')
