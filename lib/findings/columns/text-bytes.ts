const encoder = new TextEncoder();
const decoder = new TextDecoder('utf-8', { ignoreBOM: true });

export function encoded(text: string): Uint8Array {
  return encoder.encode(text);
}

export function decoded(bytes: Uint8Array): string {
  return decoder.decode(bytes);
}
