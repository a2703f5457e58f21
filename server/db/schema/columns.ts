import { customType, datetime } from 'drizzle-orm/mysql-core'
import { ROLES, type Role } from '../../../shared/schemas/lists'

/** A ULID made where the thing is born. ASCII, compared byte by byte. */
export const ulid = customType<{ data: string }>({ dataType: () => 'char(26) CHARACTER SET ascii COLLATE ascii_bin' })
/** SHA-256 as 64 lower-case hex digits. */
export const sha = customType<{ data: string }>({ dataType: () => 'char(64) CHARACTER SET ascii COLLATE ascii_bin' })
/** A short code of a closed or key-like kind (step keys, turn addresses, event kinds). */
export const code = (length: number) => customType<{ data: string }>({ dataType: () => `varchar(${length}) CHARACTER SET ascii COLLATE ascii_bin` })
export const mediumtext = customType<{ data: string }>({ dataType: () => 'mediumtext' })
export const longtext = customType<{ data: string }>({ dataType: () => 'longtext' })
/** UTC to the millisecond. */
export const moment = (name: string) => datetime(name, { mode: 'date', fsp: 3 })
/** A set of roles, as MariaDB's SET. */
export const roleSet = customType<{ data: Role[], driverData: string }>({
  dataType: () => `set(${ROLES.map(role => `'${role}'`).join(',')})`,
  toDriver: roles => roles.join(','),
  fromDriver: text => ROLES.filter(role => text.split(',').includes(role)),
})
