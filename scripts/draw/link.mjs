/** Pictures of the wrapped-loop link. */
import * as p from './parts.mjs'

const neck = (x, y0, y1) => p.wire(`M${x} ${y0}V${y1}`)
/** A loop that stands on a neck: centre over x. */
const standing = (x, y, r = 50) => p.loop(x, y, r)
const onBead = (...parts) => [p.bead(330, 420, 110), ...parts]

export const LINK = {
  'straighten': ['Wire drawn through nylon jaws', p.wire('M30 300C120 210 180 250 250 220'), p.wire('M250 220H630'), p.at(250, 220, 90, p.flatNose(7)), p.arrow('M520 170H600', [604, 170], 0)],
  'bead-hole': ['A bead under the loupe', p.bead(330, 220, 150), p.hole(370, 190, 34), p.loupe(350, 205, 175), p.look(370, 190, 62)],
  'cut': ['Cutter at the mark, finger on the offcut', p.at(60, 300, 0, p.rule(540, 40)), p.wire('M60 278H600'), p.at(430, 278, -90, p.cutter(9)), p.at(470, 270, 0, p.finger(150)), p.look(430, 278, 30)],
  'mark': ['Ink mark on the wire beside the rule', p.at(60, 250, 0, p.rule(540, 40)), p.wire('M60 226H600'), p.line('M330 208V244', 6), p.arrow('M330 110V180', [330, 186], 90)],
  'bend': ['Wire bent square at the jaw', p.wire('M90 250H330V70'), p.at(322, 250, 0, p.flatNose(8)), p.at(250, 120, 40, p.finger(120)), p.arrow('M250 210A90 90 0 0 1 310 130', [312, 124], -60)],
  'circle': ['Jaw moved round, wire crossing in front of the neck', ...onBead(neck(330, 320, 244), p.at(330, 176, 0, p.roundNose(12)), standing(330, 176, 56), p.wire('M330 232C300 236 280 262 262 300'), p.arrow('M420 80A120 120 0 0 0 250 100', [246, 106], 130))],
  'centre': ['The line of the wire through the middle of the loop', ...onBead(neck(330, 320, 250), standing(330, 180, 62), p.line('M330 60V420', 3, p.GARNET), p.wire('M330 244H230'))],
  'trim': ['Flat face of the cutter against the last turn', p.loop(150, 220, 70), p.wire('M216 220H560'), p.turns(250, 220, 3, 30, 16), p.wire('M300 190V100'), p.at(308, 178, -70, p.cutter(8)), p.look(302, 180, 28)],
  'press': ['Bent jaw pressing the wire end in', p.loop(150, 240, 70), p.wire('M216 240H560'), p.turns(250, 240, 3, 30, 16), p.wire('M298 210l14 -8'), p.at(318, 178, -18, p.bentNose(5)), p.arrow('M300 110V150', [300, 156], 90)],
  'thread': ['Bead slid down to the turns', p.loop(100, 220, 60), p.wire('M158 220H630'), p.turns(190, 220, 3, 28, 16), p.bead(400, 220, 100), p.arrow('M560 110H470', [464, 110], 180), p.hole(498, 220, 10)],
  'bend-second': ['Jaw between the bead and the bend', p.bead(150, 260, 110), p.wire('M258 260H350V80'), p.at(300, 262, 90, p.flatNose(9)), p.look(275, 262, 34)],
  'plane': ['First loop and bent end in one plane', p.loop(110, 240, 60), p.wire('M168 240H500V110'), p.bead(330, 240, 90), p.line('M40 310H620M40 170H620', 2, p.STEEL), p.turns(200, 240, 3, 26, 14)],
  'square': ['First loop seen edge on, bent end square to it', p.wire('M110 180V300', 14), p.wire('M110 240H500V110'), p.bead(330, 240, 90), p.turns(190, 240, 3, 26, 14), p.line('M470 240h-0v-0', 2), p.line('M470 214h30', 3, p.GARNET)],
  'turn-second': ['Wire rolled over the jaw to the neck', p.bead(130, 260, 110), p.wire('M238 260H330C330 180 380 150 420 160C480 176 490 240 440 270'), p.at(400, 214, -40, p.roundNose(10)), p.arrow('M520 140A120 120 0 0 1 520 290', [514, 296], 120)],
  'circle-second': ['Wire crossing in front of the neck', p.bead(130, 240, 110), p.wire('M238 240H340'), p.loop(420, 240, 66), p.wire('M352 240C352 290 340 320 320 360'), p.look(350, 246, 34)],
  'centre-second': ['The line of the wire through the second loop', p.bead(150, 240, 110), p.wire('M258 240H360'), p.loop(430, 240, 66), p.line('M20 240H640', 3, p.GARNET)],
  'wrap-second': ['Turns filling the neck, the last at the bead', p.bead(170, 240, 120), p.wire('M288 240H420'), p.loop(470, 240, 58), p.turns(300, 240, 6, 30, 16), p.wire('M300 270V360'), p.look(298, 240, 44)],
  'trim-second': ['Cutter flat to the last turn, clear of the bead', p.bead(150, 260, 110), p.wire('M258 260H400'), p.loop(450, 260, 56), p.turns(276, 260, 6, 28, 16), p.wire('M276 232V120'), p.at(290, 196, -60, p.cutter(8)), p.look(278, 200, 28)],
  'press-second': ['Bent jaw pressing the second end in', p.bead(150, 260, 110), p.wire('M258 260H400'), p.loop(450, 260, 56), p.turns(276, 260, 6, 28, 16), p.wire('M280 232l10 -10'), p.at(306, 206, -24, p.bentNose(5)), p.arrow('M282 130V176', [282, 182], 90)],
  'turns-yes': ['Turns as they should be', p.wire('M190 220H600'), p.bead(520, 220, 110), p.turns(260, 220, 9, 40, 16, 15), p.loop(120, 220, 66)],
  'turns-nearly': ['One gap between turns', p.wire('M190 220H600'), p.bead(520, 220, 110), p.turns(260, 220, 4, 40, 16, 15), p.turns(340, 220, 4, 40, 16, 15), p.loop(120, 220, 66), p.look(330, 220, 40)],
  'turns-no': ['Turns that cross', p.wire('M190 220H600'), p.bead(520, 220, 110), p.turns(260, 220, 6, 40, 22, 15), p.wire('M280 176L380 264', 15), p.loop(120, 220, 66), p.look(330, 220, 66)],
}
