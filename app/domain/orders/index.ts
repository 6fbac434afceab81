export { ACCESS, ACTS, type Act, mayDo } from "./access";
export { API_SCOPE_WORDS, API_SCOPES, type ApiScope, isApiScope } from "./api-scope";
export { type ApiWaiting, apiWaiting, WAITING_CODES, type WaitingCode } from "./api-waiting";
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
export { MESSAGE_LIMITS } from "./message";
export {
  checkMove,
  MOVE_NAMES,
  MOVES,
  type MoveName,
  type MoveVerdict,
  type Need,
  type OrderFacts,
  STEP_BACK,
} from "./moves";
export { allReached, type PieceFacts, progressOf, stageFromPieces } from "./pieces";
export { isRole, ROLES, type Role, STAFF_ROLES } from "./role";
export { type ShopSettings, shopSettingsSchema } from "./settings";
export { type ShipTo, shipToSchema } from "./ship-to";
export { MAIN_LINE, type PieceStage, SHOP_STAGES, STAGES, type Stage } from "./stage";
