import { readdirSync, readFileSync } from 'node:fs'

/** What the kernel tells of a process (proc(5), stat), or null where it is gone or has ended and only waits to be counted. */
function statOf(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8')
    // The name, field 2, is in brackets and may hold spaces and brackets.
    const [state, , group, ...rest] = stat.slice(stat.lastIndexOf(')') + 2).split(' ')
    return state === 'Z' || state === 'X' ? null : { group: Number(group), began: rest[16] }
  }
  catch {
    return null
  }
}

/** What tells a process from any other that ever had its number: when it began, in clock ticks since the machine did (field 22). Null where it is gone. */
export const beganAt = pid => statOf(pid)?.began ?? null

/** Is anything of a process group left? */
export const isLeft = group => readdirSync('/proc').some(name => /^\d+$/.test(name) && statOf(name)?.group === group)
