/** Changes whenever the same answers could give another estimate; stored with every advice. */
export const modelVersion = "1.0.0";
