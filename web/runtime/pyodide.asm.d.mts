export default function createPyodideModule(settings: object): Promise<object>;
