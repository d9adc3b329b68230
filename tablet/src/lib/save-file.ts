/** Hands a file to the browser's own downloads. */
export function saveFile(content: Blob, name: string): void {
  const url = URL.createObjectURL(content);
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  // The download reads the address after the click has returned.
  setTimeout(() => URL.revokeObjectURL(url), 60_000);
}
