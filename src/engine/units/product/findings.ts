/** Codes a product may emit. */
export const PRODUCT_FINDINGS = ['product/flammable-to-atmosphere'] as const;
