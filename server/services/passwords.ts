import { Hash } from '@adonisjs/hash'
import { Scrypt } from '@adonisjs/hash/drivers/scrypt'

/** scrypt as OWASP's password storage sheet asks: N = 2^17, r = 8, p = 1, which takes 128 MiB. */
export const SHIPPED_LOG2 = 17
/** At most two at once: a class that comes in at six waits a moment instead of filling the memory. */
const AT_ONCE = 2

export interface Passwords {
  make(password: string): Promise<string>
  /** Does the same work for an account that is not there (`hash` null) as for a wrong password. */
  check(hash: string | null, password: string): Promise<boolean>
  /** Was the hash made with other numbers than these? */
  isOld(hash: string): boolean
}

/** Hashing at a cost of 2^log2. Tests and the demo set less; one test asserts what is shipped. */
export function passwordsAt(log2: number): Passwords {
  const cost = 2 ** log2
  const hash = new Hash(new Scrypt({ cost, blockSize: 8, parallelization: 1, maxMemory: 160 * 1024 * 1024 }))
  const inTurn = turns(AT_ONCE)
  let nobody: Promise<string> | null = null
  return {
    make: password => inTurn(() => hash.make(password)),
    async check(stored, password) {
      nobody ??= inTurn(() => hash.make('nobody has this password'))
      const against = stored ?? await nobody
      const same = await inTurn(() => hash.verify(against, password).catch(() => false))
      return same && stored !== null
    },
    isOld: stored => hash.needsReHash(stored),
  }
}

/** Lets `most` pieces of work run at a time; the rest wait in order. */
export function turns(most: number): <T>(work: () => Promise<T>) => Promise<T> {
  let running = 0
  const waiting: (() => void)[] = []
  return async (work) => {
    if (running >= most) await new Promise<void>(resolve => waiting.push(resolve))
    running++
    try {
      return await work()
    }
    finally {
      running--
      waiting.shift()?.()
    }
  }
}
