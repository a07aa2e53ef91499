import { lawsOfAnyNet } from "./laws-of-any-net";

lawsOfAnyNet(300, 90210);
