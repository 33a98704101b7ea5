/**
 * The only exception this folder throws on purpose: a file that cannot be read safely, or an edit that would harm it.
 * The message is one line that names the part, sheet or cell, without a full stop; what a damaged file put into it is made fit to be
 * shown. Any other exception is a bug.
 */
export class BookError extends Error {
  override name = 'BookError';

  constructor(message: string) {
    super(oneLine(message));
  }
}

const LONGEST = 500;

function oneLine(message: string): string {
  // eslint-disable-next-line no-control-regex -- control characters are what is replaced
  const plain = message.replace(/[\u0000-\u001f\u007f-\u009f\u2028\u2029\ud800-\udfff]/gu, '\ufffd');
  return plain.length > LONGEST ? `${plain.slice(0, LONGEST)}…` : plain;
}
