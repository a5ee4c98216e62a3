/** The part of the serializer that writes; the package ships no types. */
declare module '@jscad/stl-serializer/CSGToStlb.js' {
  interface Polygons {
    readonly polygons: readonly { readonly vertices: readonly (readonly number[])[] }[];
    readonly transforms: readonly number[];
  }
  /** Header, triangle count and triangles, to be laid end to end. */
  const serializer: { serializeBinary(objects: readonly Polygons[], options: object): ArrayBuffer[] };
  export default serializer;
}
