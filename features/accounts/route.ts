import 'server-only';
import { isSameOrigin, jsonOfError, jsonProblem } from '@/lib/http';
import type { Viewer } from './model';
import { currentViewer } from './viewer';

/**
 * A route handler for a signed-in person: `export const GET = withViewer(async (viewer, request, { params }) => …)`.
 * Signed out is 401; a write from another site 403; what the viewer may not do 403; what is missing, or not theirs to
 * see, 404. A bug throws on, to the server's log and a bare 500.
 */
export function withViewer<Context>(
  handler: (viewer: Viewer, request: Request, context: Context) => Promise<Response>,
  who: () => Promise<Viewer | null> = currentViewer,
): (request: Request, context: Context) => Promise<Response> {
  return async (request, context) => {
    const reads = request.method === 'GET' || request.method === 'HEAD';
    if (!reads && !isSameOrigin(request)) return jsonProblem(403, 'This request came from another site. Nothing was changed.');
    const viewer = await who();
    if (!viewer) return jsonProblem(401, 'Sign in first.');
    try {
      return await handler(viewer, request, context);
    } catch (error) {
      const answer = jsonOfError(error);
      if (answer) return answer;
      throw error;
    }
  };
}
