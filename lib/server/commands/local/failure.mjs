/** Something the person at the terminal can mend: shown as its one line, without a stack. */
export class Failure extends Error {}
