import type { Rule } from './context'
import { choiceWords } from './choice-words'
import { corners } from './corners'
import { repeats } from './repeats'
import { expressions } from './expressions'
import { history } from './history'
import { holds } from './holds'
import { names } from './names'
import { permissions } from './permissions'
import { pictures } from './pictures'
import { prose } from './prose'
import { references } from './references'
import { safety } from './safety'
import { teaching } from './teaching'

/** In the order they run: names first, as the others ask for kinds. */
export const RULES: readonly Rule[] = [names, corners, expressions, repeats, choiceWords, references, holds, pictures, permissions, safety, prose, teaching, history]
