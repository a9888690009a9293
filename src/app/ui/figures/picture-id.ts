let made = 0;

/** An id that no other picture on the page has; patterns are referred to by id. */
export function nextPictureId(): string {
  made += 1;
  return `picture-${made}`;
}
