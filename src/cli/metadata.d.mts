import type { ICustomFunctionsMetadata } from "custom-functions-metadata";

export declare const DEVELOPMENT_URL: string;

export type Metadata = ICustomFunctionsMetadata & { readonly allowErrorForDataTypeAny: true };

export declare function buildMetadata(where: {
  readonly baseUrl: string;
  readonly sources?: string;
}): Promise<Metadata>;
