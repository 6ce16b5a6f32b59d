// Every custom element, each defined by the module that holds it.
export {};
