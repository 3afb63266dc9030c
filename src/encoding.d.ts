/** The part of the WHATWG Encoding Standard that the core uses; every browser and Node carry it, the ES2022 library does not. */
interface TextDecoder {
  decode(input?: Uint8Array): string;
}
declare var TextDecoder: {
  new (label?: string, options?: { fatal?: boolean; ignoreBOM?: boolean }): TextDecoder;
};
