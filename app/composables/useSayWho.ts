/** True once an answer has said that nobody is here any more. Coming in loads the application anew, which ends it. */
export const useSayWho = () => useState('say-who', () => false)
