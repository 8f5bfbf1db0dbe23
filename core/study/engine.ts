/** Version of the engine: that of the program in package.json (a test holds the two together). Results carry it. */
export const ENGINE_VERSION = '0.1.0';
