/** A place one can go to from anywhere. */
export interface Place {
  readonly name: string;
  readonly link: string;
}
