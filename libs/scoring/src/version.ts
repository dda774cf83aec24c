/** Named in every verdict; changes whenever the same readings and plan could give other figures. */
export const METHOD_VERSION = 'smoothing-spline 2';
