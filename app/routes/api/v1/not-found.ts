import { ApiError, errorAnswer } from '#app/features/api/api.server.ts';

function answer() {
  return errorAnswer(new ApiError(404, 'not_found', 'There is no such address in this API.'));
}

export const loader = answer;
export const action = answer;
