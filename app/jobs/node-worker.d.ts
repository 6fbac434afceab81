declare module "*?node-worker" {
  /** URL of the module, to be run in a worker thread. */
  const url: string;
  export default url;
}
