import type { Route } from "./+types/layout";
import { answerProblems } from "./problems.server";
import { limitRate } from "./rate.server";

export const middleware: Route.MiddlewareFunction[] = [answerProblems, limitRate];
