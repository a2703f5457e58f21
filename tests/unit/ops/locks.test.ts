import { type ChildProcess, spawn } from 'node:child_process'
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { counted } from '../../../scripts/lib/counted.mjs'
import { foldersOf } from '../../../scripts/lib/folders.mjs'
import { endLeftOver, noteChild, takeFolder, withLock } from '../../../scripts/lib/locks.mjs'
import { beganAt } from '../../../scripts/lib/processes.mjs'
import { endAll, run, until, whyNot } from '../../../scripts/lib/run.mjs'

let folder: string
const started: ChildProcess[] = []
beforeEach(() => { folder = mkdtempSync(join(tmpdir(), 'studio-')) })
afterEach(() => {
  for (const child of started.splice(0)) child.kill('SIGKILL')
  rmSync(folder, { recursive: true, force: true })
})
const sleeper = async (): Promise<number> => {
  const child = spawn('sleep', ['300'], { stdio: 'ignore' })
  started.push(child)
  await new Promise(resolve => child.on('spawn', resolve))
  return child.pid ?? 0
}

describe('a folder', () => {
  /** Another process that has the folder until it is ended. */
  async function other(): Promise<ChildProcess> {
    const locks = new URL('../../../scripts/lib/locks.mjs', import.meta.url)
    const code = `const { takeFolder } = await import(${JSON.stringify(locks.href)}); await takeFolder(${JSON.stringify(foldersOf(folder))}); console.log('has it'); setInterval(() => {}, 1000)`
    const child = spawn(process.execPath, ['--input-type=module', '-e', code], { stdio: ['ignore', 'pipe', 'inherit'] })
    started.push(child)
    await new Promise(resolve => child.stdout?.once('data', resolve))
    return child
  }

  it('is one start’s at a time; the second is told which process has it', async () => {
    const child = await other()
    await expect(takeFolder(foldersOf(folder))).rejects.toThrow(`running here already (process ${child.pid})`)
  })

  it('is free at once when who had it is killed outright, whatever was left behind', async () => {
    const child = await other()
    child.kill('SIGKILL')
    await new Promise(resolve => child.on('exit', resolve))
    expect(existsSync(foldersOf(folder).lock)).toBe(true)
    const release = await takeFolder(foldersOf(folder))
    await release()
    expect(existsSync(foldersOf(folder).lock)).toBe(false)
  })

  it('is had by one of many that ask at the same moment', async () => {
    const asked = await Promise.allSettled(Array.from({ length: 12 }, () => takeFolder(foldersOf(folder))))
    const had = asked.flatMap(one => one.status === 'fulfilled' ? [one.value] : [])
    expect(had).toHaveLength(1)
    await had[0]?.()
  })

  it('may be told whole, elsewhere than beside the sources', () => {
    expect(foldersOf('/srv/studio').data).toBe('/srv/studio')
    expect(foldersOf('.data-x').data).toMatch(/\/\.data-x$/)
  })
})

describe('what is shared', () => {
  it('is worked on by one after another', async () => {
    const order: string[] = []
    const work = (name: string) => withLock(folder, 'packages', async () => {
      order.push(`${name} begins`)
      await new Promise(resolve => setImmediate(resolve))
      order.push(`${name} ends`)
    })
    await Promise.all([work('a'), work('b'), work('c')])
    for (let i = 0; i < order.length; i += 2) expect(order[i + 1]).toBe(order[i]?.replace('begins', 'ends'))
    expect(order).toHaveLength(6)
  })
})

describe('what a killed start left running', () => {
  it('is ended by the next one', async () => {
    const pid = await sleeper()
    noteChild(foldersOf(folder), 'server.pid', pid)
    await endLeftOver(foldersOf(folder), until)
    expect(beganAt(pid)).toBeNull()
    expect(existsSync(join(folder, 'server.pid'))).toBe(false)
  })

  it('is left alone when its number is another’s by now', async () => {
    const pid = await sleeper()
    writeFileSync(join(folder, 'server.pid'), `${pid} 1`)
    writeFileSync(join(folder, 'catcher.pid'), String(pid))
    writeFileSync(join(folder, 'database.pid'), '')
    await endLeftOver(foldersOf(folder), until)
    expect(beganAt(pid)).not.toBeNull()
    expect(existsSync(join(folder, 'server.pid'))).toBe(false)
  })
})

describe('what was started', () => {
  it('ends with us, and so does what it started itself', async () => {
    const pids = join(folder, 'pids')
    const running = run('sh', ['-c', `sleep 300 & echo $! > ${pids}; sleep 300`])
    await vi.waitFor(() => expect(existsSync(pids)).toBe(true))
    await endAll()
    expect((await running).code).not.toBe(0)
    const { out } = await run('cat', [pids], { keep: true })
    expect(beganAt(Number(out))).toBeNull()
  })

  it('is the last: who goes on with the next thing while we end starts nothing', async () => {
    const lib = new URL('../../../scripts/lib/run.mjs', import.meta.url)
    const after = join(folder, 'after')
    const code = `const { endAll, run, startNoMore } = await import(${JSON.stringify(lib.href)})
      const next = run('sleep', ['300']).then(() => run('touch', [${JSON.stringify(after)}])).catch(error => error.message)
      startNoMore(); await endAll(); console.log(await next)`
    const { code: ended, out } = await run(process.execPath, ['--input-type=module', '-e', code], { keep: true })
    expect({ ended, out: out.trim(), isThere: existsSync(after) }).toEqual({ ended: 0, out: 'It was stopped.', isThere: false })
  })

  it('fails in a sentence when it does not come', async () => {
    await expect(until(() => false, 0.2, 'It did not answer.')).rejects.toThrow('It did not answer.')
  })
})

describe('a port', () => {
  it('is told to be free, taken, or nowhere here', async () => {
    const server = createServer()
    await new Promise<void>(resolve => server.listen(0, '127.0.0.1', () => resolve()))
    const address = server.address()
    const port = typeof address === 'object' && address ? address.port : 0
    expect(await whyNot(port, '127.0.0.1')).toBe('EADDRINUSE')
    await new Promise(resolve => server.close(resolve))
    expect(await whyNot(port, '127.0.0.1')).toBeNull()
    // An address kept for documentation (RFC 5737): no machine has it.
    expect(await whyNot(port, '192.0.2.1')).toBe('EADDRNOTAVAIL')
  })
})

describe('the count of a stage', () => {
  it('takes a test that was left out, a code, and nothing at all for failures', () => {
    expect(counted({ passed: 5, failed: 0, left: 0 }, 0)).toEqual({ passed: 5, failed: 0 })
    expect(counted({ passed: 5, failed: 1, left: 2 }, 1)).toEqual({ passed: 5, failed: 3 })
    expect(counted({ passed: 5, failed: 0, left: 1 }, 0)).toEqual({ passed: 5, failed: 1 })
    expect(counted({ passed: 5, failed: 0, left: 0 }, 1)).toEqual({ passed: 5, failed: 1 })
    expect(counted({ passed: 0, failed: 0, left: 0 }, 0)).toEqual({ passed: 0, failed: 1 })
  })
})
