/** Criteria and materials of the front matter. */
import { nearNames, orNear } from './findings'
import type { Entry } from './front'
import { readAtLevels } from './head-figures'
import { find, type Reader } from './read'
import type { Criterion, Material } from './schema'
import { isKey } from './slugs'

const CRITERION_KEYS = ['key', 'judge', 'measure', 'spread', 'say', 'how', 'essential', 'seen', 'when', 'within', 'pictures']

export function readCriteria(read: Reader, entry: Entry | undefined): Criterion[] {
  const keys = new Set<string>()
  return read.maps(entry).flatMap(({ entries, at }) => {
    read.unknownKeys(entries.filter(each => !/^at level [1-5]$/.test(each.key)), CRITERION_KEYS, key => orNear(nearNames(key, CRITERION_KEYS)))
    const key = read.text(find(entries, 'key')) ?? ''
    if (!isKey(key)) { read.findings.add('criterion-key', at, 'A criterion has a key, small letters, digits and -, which it keeps for ever.'); return [] }
    if (keys.has(key)) { read.findings.add('duplicate-key', at, `There are two criteria with the key ${key}.`); return [] }
    keys.add(key)
    const ways = (['judge', 'measure', 'spread'] as const).filter(way => find(entries, way))
    const [by] = ways
    if (!by || ways.length > 1) { read.findings.add('criterion-kind', at, `${key}: a criterion is judged, measured or a spread: one of judge, measure, spread.`); return [] }
    const told = read.text(find(entries, by)) ?? ''
    const pictures = Object.fromEntries(read.map(find(entries, 'pictures')).map(each => [each.key, read.text(each) ?? '']))
    return [{
      key, by, says: by === 'judge' ? told : read.text(find(entries, 'say')) ?? told, reading: by === 'judge' ? null : told, how: read.text(find(entries, 'how')), essential: read.yesNo(find(entries, 'essential')) ?? false,
      live: read.oneOf(find(entries, 'seen'), ['live']) === 'live', when: read.node(find(entries, 'when')), within: read.node(find(entries, 'within')), atLevels: readAtLevels(read, entries), pictures,
      range: read.findings.range(at.from, at.to),
    }]
  })
}

const MATERIAL_KEYS = ['name', 'metal', 'wire', 'cord', 'size', 'each', 'length', 'spare', 'when']

export function readMaterials(read: Reader, entry: Entry | undefined): Material[] {
  return read.maps(entry).map(({ entries, at }) => {
    read.unknownKeys(entries, MATERIAL_KEYS, key => orNear(nearNames(key, MATERIAL_KEYS)))
    const node = (key: string) => read.node(find(entries, key))
    return {
      name: read.text(find(entries, 'name')) ?? '', metal: node('metal'), wire: node('wire'), cord: node('cord'), size: node('size'), each: node('each'), length: node('length'), spare: node('spare'), when: node('when'),
      range: read.findings.range(at.from, at.to),
    }
  })
}
