export { type InterpretedFile, interpretFiles, type LayerChoice } from "./default-interpretation";
export {
  type FileInterpretation,
  fileInterpretationSchema,
  type Interpretation,
  interpretationSchema,
  layerRuleSchema,
  partChoiceSchema,
  SANDING_LEVELS,
  type Sanding,
  sandingSchema,
} from "./interpretation";
export { isRole, ROLES, type Role, STAFF_ROLES } from "./role";
export { type ShopSettings, shopSettingsSchema } from "./settings";
export { type ShipTo, shipToSchema } from "./ship-to";
export { MAIN_LINE, type PieceStage, SHOP_STAGES, STAGES, type Stage } from "./stage";
