/** One plain sentence for the person at the terminal. */
export const say = text => process.stdout.write(`${text}\n`)

/** Ends with a sentence and without a stack: the person can do something about it. */
export class Trouble extends Error {}
export const trouble = (text) => { throw new Trouble(text) }
