/** What a message is made of; the text and the HTML part come from the same blocks. Plain data, so that a job can carry it. */
export type MailBlock =
  | { readonly kind: 'heading'; readonly text: string }
  | { readonly kind: 'paragraph'; readonly text: string }
  /** A link into the application: `path` begins with `/`, the address before it is APP_URL. */
  | { readonly kind: 'link'; readonly label: string; readonly path: string };
