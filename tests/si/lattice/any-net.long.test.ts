import { lawsOfAnyNet } from "./laws-of-any-net";

lawsOfAnyNet(1000, 90210);
