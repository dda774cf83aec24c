/** What the smoothness of a method is called in the answer. */
export const sizeName = (method: string): 'lambda' | 'knots' | 'degree' =>
  method === 'smoothing-spline' ? 'lambda' : method === 'polynomial' ? 'degree' : 'knots';
