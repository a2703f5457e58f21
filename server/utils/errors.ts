/** Sentences that more than one handler answers with. */
export const WHO_ARE_YOU = 'Say who you are.'
export const NO_STUDIO = 'You have no place in a studio at present. Ask the manager of your studio.'
export const NOT_YOUR_PART = 'This is not open to you in this studio.'
export const NOT_READ = 'Some of this could not be read. Look at the places named.'
export const ONLY_JSON = 'Send this as JSON.'
export const OTHER_SITE = 'This came from another site and was not done.'
export const WRONG_PASSWORD = 'That is not your password. Nothing was done.'
export const TOO_MANY_TRIES = 'Too many tries. Wait a while, then try again.'
