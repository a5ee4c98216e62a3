/** Starter jobs are bundled as text. */
declare module '*.yaml' {
  const text: string;
  export default text;
}
