/** A change that the rows cannot take; the message is a sentence for who asked, without its full stop. */
export class ChangeRefused extends RangeError {
  override readonly name = 'ChangeRefused';
}
