/** Hands a text to the browser as a file. */
export function download(document: Document, name: string, type: string, text: string): void {
  const url = URL.createObjectURL(new Blob([text], { type }));
  const link = document.createElement('a');
  link.href = url;
  link.download = name;
  link.click();
  URL.revokeObjectURL(url);
}

/** A file name out of what people called the thing. */
export function fileName(title: string, ending: string): string {
  const plain = title
    .toLowerCase()
    .replace(/[^\p{Letter}\p{Number}]+/gu, '-')
    .replace(/^-|-$/g, '');
  return `${plain === '' ? 'study' : plain}.${ending}`;
}
