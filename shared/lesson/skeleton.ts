/** The text a new lesson begins with. */
import type { Craft } from './schema'

/** Text for a place where YAML reads one value: in quotes wherever plain text could be read as something else. */
const yamlText = (text: string): string => (/^[A-Za-z][A-Za-z0-9 ,.()-]*$/.test(text) && !/^(?:yes|no|true|false|null|on|off)$/i.test(text) ? text : JSON.stringify(text))

/**
 * A source with every part of a lesson in it and, beside each, what to write there. It is not ready for use: its fault
 * says neither why nor what to do, and that shows in the margin until it is written.
 */
export function skeletonOf(title: string, craft: Craft): string {
  return `---
title: ${yamlText(title)}
craft: ${craft}
piece: one piece              # what goes in one bag: one ... or set of 10
covers: ""                    # which sizes, metals, stones; in words
not_for: ""                   # what it must not be used for
at_stake: ""                  # what is lost if it goes wrong
needs: []                     # lessons to hold first, by their address: [bench-safety]
permissions: []               # flame, motors, pickle, mill, goods
time: { maker: 5 min, first: 30 min, later: 10 min }
keeps: 6 months               # how long a sign-off lives without practice
tools: [Eye protection]
materials: []                 # - { name: Round wire, metal: metal, wire: wire, length: cut }
sizes:                        # what is told before the piece begins
  wire: { ask: "Wire, measured", unit: wire, usual: 0.7 mm, from: 0.6 mm, to: 0.9 mm }
figures:                      # worked out in order; each may use those above it
  cut: 60 mm + 2 * wire
readings:                     # what is measured and typed
  long: { ask: "Cut wire, end to end", unit: mm, is: cut, within: 0.5 mm, with: Calliper }
criteria:                     # what a judge looks at, in order; a key is for ever
  - { key: length, measure: long, say: Length as told }
closing: [Offcuts in the scrap tray, Tools back]
# Below the dashes: what the piece is, in a sentence or two; then the steps, each under ##.
---

## Cut to length

WARNING Cut wire flies and can blind
  Eye protection on. Keep a finger on the offcut and cut over the bin.

Cut {cut} of {wire} wire.

READING long

FAULT It is short
  because:
  do:
`
}
