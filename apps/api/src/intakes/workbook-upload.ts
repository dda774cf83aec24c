import {
  applyDecorators,
  type CallHandler,
  type ExecutionContext,
  Injectable,
  type NestInterceptor,
  PayloadTooLargeException,
  UseInterceptors,
} from '@nestjs/common';
import { FileInterceptor } from '@nestjs/platform-express';
import { ApiBody, ApiConsumes } from '@nestjs/swagger';
import { DomainError } from '@app/contracts';
import { catchError, type Observable, throwError } from 'rxjs';

const MAX_BYTES = 30 * 1024 * 1024;

@Injectable()
class TooLargeInterceptor implements NestInterceptor {
  intercept(_context: ExecutionContext, next: CallHandler): Observable<unknown> {
    return next
      .handle()
      .pipe(
        catchError((error: unknown) =>
          throwError(() =>
            error instanceof PayloadTooLargeException
              ? new DomainError(
                  'too_large',
                  'file-too-large',
                  'The file is larger than 30 MB. Split it by shift and upload the parts.',
                )
              : error,
          ),
        ),
      );
  }
}

/** Takes one file in the multipart field `file`, at most 30 MB. */
export const WorkbookUpload = () =>
  applyDecorators(
    UseInterceptors(
      TooLargeInterceptor,
      FileInterceptor('file', { limits: { fileSize: MAX_BYTES, files: 1, fields: 5, parts: 10 } }),
    ),
    ApiConsumes('multipart/form-data'),
    ApiBody({
      schema: { type: 'object', required: ['file'], properties: { file: { type: 'string', format: 'binary' } } },
    }),
  );

/** The file's name as the person saw it: multer hands the bytes of the header as Latin-1. */
export function uploadedFile(file: Express.Multer.File | undefined): { name: string; bytes: Buffer } {
  if (!file)
    throw new DomainError(
      'invalid',
      'file-missing',
      'No file came with the request. Send the workbook in the field "file".',
      [{ pointer: '/file', code: 'file-missing', detail: 'Choose a workbook.' }],
    );
  const decoded = Buffer.from(file.originalname, 'latin1').toString('utf8');
  const name = decoded.includes('�') ? file.originalname : decoded;
  return {
    name:
      name
        .replace(/[\u0000-\u001f/\\]/g, ' ')
        .trim()
        .slice(0, 200) || 'workbook.xlsx',
    bytes: file.buffer,
  };
}
