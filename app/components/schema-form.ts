import { type DefaultValue, type SubmissionResult, useForm } from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { useNavigation } from "react-router";
import type { z } from "zod";

interface SchemaForm<Input extends Record<string, unknown>, Output> {
  readonly id: string;
  readonly schema: z.ZodType<Output, Input>;
  /** What the action said of the last submission. */
  readonly lastResult: SubmissionResult<string[]> | null | undefined;
  readonly values?: DefaultValue<Input>;
}

/** A conform form whose schema is checked in the browser as on the server: on leaving a field, then as it is typed. */
export function useSchemaForm<Input extends Record<string, unknown>, Output>({
  id,
  schema,
  lastResult,
  values,
}: SchemaForm<Input, Output>) {
  const navigation = useNavigation();
  const pending = navigation.state !== "idle" && navigation.formMethod === "POST";
  const [form, fields] = useForm<Input, Output>({
    id,
    lastResult: navigation.state === "idle" ? lastResult : null,
    constraint: getZodConstraint(schema),
    defaultValue: values,
    shouldValidate: "onBlur",
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema }),
  });
  return { form, fields, pending };
}
