/** Where the engine comes from: an address, or its bytes. */
export type EngineSource = string | { readonly href: string } | ArrayBuffer | Uint8Array;
