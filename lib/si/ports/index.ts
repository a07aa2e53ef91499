export { portEntry, portIndex, type PortData, type TwoPortChain } from "./port-data";
export { cascade, chainFromScattering, deEmbed, invertChain, scatteringFromChain } from "./chain";
export { scatteringFromTransfer, transferFromScattering } from "./transfer";
export { scatteringFromImmittance } from "./from-immittance";
export { portFigures, type PortFigures } from "./figures";
