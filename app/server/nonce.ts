import { createContext } from "react-router";

/** The content policy's nonce of this response; undefined in development, where there is no policy. */
export const nonceContext = createContext<string | undefined>(undefined);
