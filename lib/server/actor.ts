/** Who does something, and from where: what the audit trail keeps of a request. `userId` is null for the system itself. */
export interface Actor {
  readonly userId: string | null;
  readonly address: string;
}

/** A person at work; use cases that record an author take this. */
export interface Person extends Actor {
  readonly userId: string;
}
