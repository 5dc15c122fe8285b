/** The release, as package.json has it; a constant because package.json stays out of what Excel loads. A test holds the two equal. */
export const PRODUCT_VERSION = "0.1.0";
