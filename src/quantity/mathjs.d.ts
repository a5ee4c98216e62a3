/** Exports of the unit library that its own declarations leave out. */
import type { FactoryFunction, FactoryFunctionMap } from 'mathjs';

declare module 'mathjs' {
  export const createUnitClass: FactoryFunction<unknown>;
  export const subtractScalarDependencies: FactoryFunctionMap;
}
