/** Version of the engine; raised only when an answer may change. */
export const ENGINE_VERSION = '1';
