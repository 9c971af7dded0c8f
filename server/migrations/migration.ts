/** A step of the schema: plain SQL both ways. Steps are only ever appended. */
export interface Migration {
  readonly name: string;
  readonly up: string;
  readonly down: string;
}
