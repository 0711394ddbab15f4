export declare const PRODUCTION_ID: string;

export declare function folderUrl(text: string | undefined): string;

export declare function productionManifest(xml: string, url: string | undefined): string;

export declare function writeManifest(args: readonly string[], dist: string): Promise<string>;
