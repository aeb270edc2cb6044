/** JSON that is text already, for a jsonb column in bulk: it is written as it is, without being parsed in between. */
export class JsonText {
  constructor(readonly text: string) {}
}
