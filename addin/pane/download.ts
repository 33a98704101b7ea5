/** Hands bytes or a text to the user as a file. */
export function download(name: string, content: Uint8Array | string): void {
  const address = URL.createObjectURL(new Blob([content as Uint8Array<ArrayBuffer> | string]));
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  setTimeout(() => URL.revokeObjectURL(address), 10_000);
}
