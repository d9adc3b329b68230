// planted: import-x/no-default-export
export default 'nameless';
