/** The invented people of the demo shop. Listed on the sign-in page in demo mode only; the seed makes them. */
import type { Role } from "./api-types";

export const DEMO_PASSWORD = "quarter-line-demo";
export const DEMO_SHOP_NAME = "Copper Bay Pipe Works";

export interface DemoPerson {
  readonly name: string;
  readonly email: string;
  readonly role: Role;
}

export const DEMO_PEOPLE: readonly DemoPerson[] = [
  { name: "Ruth Alvarado", email: "ruth@copperbay.example", role: "owner" },
  { name: "Miles Okafor", email: "miles@copperbay.example", role: "detailer" },
  { name: "Ingrid Solheim", email: "ingrid@copperbay.example", role: "inspector" },
  { name: "Danny Kowal", email: "danny@copperbay.example", role: "fitter" },
];
