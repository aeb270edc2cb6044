/** Thrown by a scientific function whose arguments lie outside its domain; the message gives the offending value. */
export class DomainError extends Error {
  override readonly name = 'DomainError';
}
