/** A file that the bundler puts in as text. */
declare module "*.txt" {
  const text: string;
  export default text;
}
