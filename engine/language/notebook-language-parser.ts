/** The grammar's parser, with highlighting tags: the editor colours and folds by it, `parseNotebook` reads its tokens. */
export { parser as notebookLanguageParser } from './notebook.parser.gen';
