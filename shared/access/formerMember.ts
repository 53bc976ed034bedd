/** Stands in a revision and a byline for somebody who left and is no longer named. Pages translate it where they show it. */
export const FORMER_MEMBER = 'former member'
