const WITNESSED = `
HOLD After this the wire is bent for good
  witness: always

  Which way does the hook open?
  right: Away from the loop
  not: Towards the loop -> It cannot be hung. Turn the wire over.
`

/** A lesson as an instructor writes it: one of everything the bench asks for. `witnessed` has a hold that waits for an instructor. */
export const hookLesson = (title: string, { witnessed = false } = {}) => `---
title: ${title}
craft: wire
piece: one hook
covers: Round half-hard wire
not_for: Wire of an unknown metal
at_stake: A hook that opens loses the earring.
needs: []
permissions: []
time: { maker: 2 min, first: 12 min, later: 5 min }
keeps: 6 months
object_may_mirror: yes
tools: [Round-nose pliers, Flush cutter, Calliper, Eye protection]
materials:
  - { name: Round wire, metal: metal, wire: wire, length: cut }
sizes:
  wire:   { ask: "Wire, measured", unit: wire, usual: 0.8 mm, from: 0.7 mm, to: 0.9 mm }
  inside: { ask: "Hook, inside", unit: mm, usual: 10, from: 8, to: 12 }
  metal:  { ask: Metal, unit: metal, usual: copper, choices: [copper, sterling silver] }
figures:
  cut: up(ring(inside, wire) / 2 + 25 mm, 1 mm)
readings:
  wide: { ask: "Hook, across", unit: mm, is: inside + 2 * wire, within: 0.5 mm, step: 0.1 mm, with: Calliper }
criteria:
  - { key: marks, judge: No plier marks seen at 30 cm, how: Eye }
  - { key: end, judge: The end is domed and nothing catches, how: Stocking, essential: yes }
  - { key: size, measure: wide, say: Hook to size }
closing: [Offcuts in the scrap tray, Tools back]
---

A hook of {wire} wire. Practise it in copper first.

## Cut to length

WARNING Cut wire flies and can blind
  Eye protection on. Keep a finger on the offcut and cut over the bin.

HOLD After this the wire is cut
  Where does the offcut go?
  right: Under a finger, over the bin
  not: Into the room -> It flies into an eye. Put a finger on it.

Cut {cut} of wire.

FEEL
  The cut end is flat under the nail.

FAULT It is short
  because: the wire was not straight
  do: Straighten it and cut again.

## Bend the hook
${witnessed ? WITNESSED : ''}
Roll the wire over the jaw.

READING wide

## Look at it

Hold it to the light.

PHOTO The hook beside the rule
`
