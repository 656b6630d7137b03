/** RDKit's own factory; its typings describe a global, the build appends the default export. */
export default function initRDKitModule(options: { locateFile: () => string }): Promise<any>;
