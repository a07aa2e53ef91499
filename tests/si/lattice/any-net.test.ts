import { lawsOfAnyNet } from "./laws-of-any-net";

lawsOfAnyNet(12, 2);
