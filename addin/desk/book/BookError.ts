/**
 * The only exception this folder throws on purpose: a file that cannot be read safely, or an edit that would harm it.
 * The message is one line that names the part, sheet or cell, without a full stop. Any other exception is a bug.
 */
export class BookError extends Error {
  override name = 'BookError';
}
