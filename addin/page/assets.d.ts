/** What the bundler makes of files that are not programs. */
declare module '*.xml' {
  const text: string;
  export { text as default };
}
declare module '*.css';
