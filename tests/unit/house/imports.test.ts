import { fileURLToPath } from 'node:url'
import { ESLint } from 'eslint'
import { describe, expect, it } from 'vitest'

const ROOT = fileURLToPath(new URL('../../..', import.meta.url))
const eslint = new ESLint({ cwd: ROOT })

async function faults(path: string, code: string): Promise<string[]> {
  const [result] = await eslint.lintText(code, { filePath: `${ROOT}/${path}` })
  return (result?.messages ?? []).map(message => message.ruleId ?? '')
}

describe('imports run one way', () => {
  it.each([
    ['app/utils/a.ts', 'import { x } from \'#server/services/x\'\n\nexport const y = x\n'],
    ['server/services/a.ts', 'import { x } from \'~/utils/x\'\n\nexport const y = x\n'],
    ['shared/bench/a.ts', 'import { ref } from \'vue\'\n\nexport const y = ref(1)\n'],
    ['shared/bench/b.ts', 'import { x } from \'../judging/x\'\n\nexport const y = x\n'],
    ['shared/lesson/a.ts', 'import { x } from \'../bench/x\'\n\nexport const y = x\n'],
    ['shared/trade/a.ts', 'import { x } from \'../lesson/x\'\n\nexport const y = x\n'],
    ['shared/judging/a.ts', 'import { x } from \'#server/db/x\'\n\nexport const y = x\n'],
  ])('%s may not', async (path, code) => {
    expect(await faults(path, code)).toContain('no-restricted-imports')
  })

  it.each([
    ['app/utils/g.ts', 'export const y = () => import(\'#server/services/x\')\n'],
    ['app/utils/h.ts', 'export const y = () => import(\'../../server/services/x\')\n'],
    ['server/services/g.ts', 'export const y = () => import(\'~/utils/x\')\n'],
    ['shared/bench/g.ts', 'export const y = () => import(\'../lesson/x\')\n'],
  ])('%s may not while it runs either', async (path, code) => {
    expect(await faults(path, code)).toContain('no-restricted-syntax')
  })

  it('the right way is let through', async () => {
    expect(await faults('shared/judging/c.ts', 'import { x } from \'../bench/x\'\n\nexport const y = x\n')).toEqual([])
    expect(await faults('app/utils/c.ts', 'export const y = () => import(\'~/utils/x\')\n')).toEqual([])
    expect(await faults('server/services/c.ts', 'import { x } from \'../../shared/bench/x\'\n\nexport const y = x\n')).toEqual([])
  })
}, 60_000)

describe('the house forbids', () => {
  it('any, SQL from text and relational queries', async () => {
    expect(await faults('server/services/d.ts', 'export const y = (x: any) => x\n')).toContain('@typescript-eslint/no-explicit-any')
    expect(await faults('server/services/e.ts', 'import { sql } from \'drizzle-orm\'\n\nexport const y = (x: string) => sql.raw(x)\n')).toContain('no-restricted-syntax')
    expect(await faults('server/services/f.ts', 'export const y = (db: { query: unknown }) => db.query\n')).toContain('no-restricted-syntax')
  })
}, 60_000)
