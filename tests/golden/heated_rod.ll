define i64 @uq_start(ptr noalias %lanes, ptr noalias readonly %settings) #0 {
entry:
  ; what depends on the inputs alone, once per member
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 19
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  store <8 x double> %v2, ptr %v3, align 64
  %v4 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v5 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  store <8 x double> %v4, ptr %v5, align 64
  ; first rates and first step
  %v6 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v7 = load <8 x double>, ptr %v6, align 64
  %v8 = getelementptr inbounds <8 x double>, ptr %lanes, i64 18
  %v9 = load <8 x double>, ptr %v8, align 64
  %v10 = getelementptr inbounds <8 x double>, ptr %lanes, i64 11
  %v11 = load <8 x double>, ptr %v10, align 64
  %v12 = fsub <8 x double> %v7, %v11
  %v13 = getelementptr inbounds <8 x double>, ptr %lanes, i64 21
  %v14 = load <8 x double>, ptr %v13, align 64
  %v15 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  %v16 = load <8 x double>, ptr %v15, align 64
  %v17 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  %v18 = load <8 x double>, ptr %v17, align 64
  %v19 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v18, <8 x double> %v12, <8 x double> %v16)
  %v20 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v19, <8 x double> %v12, <8 x double> %v14)
  %v21 = getelementptr inbounds <8 x double>, ptr %lanes, i64 20
  %v22 = load <8 x double>, ptr %v21, align 64
  %v23 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v20, <8 x double> %v12, <8 x double> %v22)
  %v24 = call <8 x double> @table.loss(<8 x double> %v2)
  %v25 = fsub <8 x double> %v23, %v2
  %v26 = fneg <8 x double> %v24
  %v27 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v9, <8 x double> %v25, <8 x double> %v26)
  %v28 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  store <8 x double> %v27, ptr %v28, align 64
  %v29 = getelementptr inbounds <8 x double>, ptr %lanes, i64 2
  %v30 = load <8 x double>, ptr %v29, align 64
  %v31 = fsub <8 x double> %v30, %v7
  %v32 = getelementptr inbounds <8 x double>, ptr %settings, i64 0
  %v33 = load <8 x double>, ptr %v32, align 64
  %v34 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v35 = getelementptr inbounds <8 x double>, ptr %settings, i64 9
  %v36 = load <8 x double>, ptr %v35, align 64
  %v37 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v33, <8 x double> %v34, <8 x double> %v36)
  %v38 = fdiv <8 x double> %v2, %v37
  %v39 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v38, <8 x double> %v38, <8 x double> splat (double 0x0000000000000000))
  %v40 = fmul <8 x double> %v39, splat (double 0x3FF0000000000000)
  %v41 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v40)
  %v42 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v43 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v33, <8 x double> %v42, <8 x double> %v36)
  %v44 = fdiv <8 x double> %v27, %v43
  %v45 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v44, <8 x double> %v44, <8 x double> splat (double 0x0000000000000000))
  %v46 = fmul <8 x double> %v45, splat (double 0x3FF0000000000000)
  %v47 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v46)
  %v48 = fcmp olt <8 x double> %v41, splat (double 0x3EE4F8B588E368F1)
  %v49 = fmul <8 x double> %v47, %v31
  %v50 = fcmp olt <8 x double> %v49, splat (double 0x3EE4F8B588E368F1)
  %v51 = or <8 x i1> %v48, %v50
  %v52 = fmul <8 x double> %v31, splat (double 0x3EB0C6F7A0B5ED8D)
  %v53 = fmul <8 x double> splat (double 0x3F847AE147AE147B), %v41
  %v54 = fdiv <8 x double> %v53, %v47
  %v55 = select <8 x i1> %v51, <8 x double> %v52, <8 x double> %v54
  %v56 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v7)
  %v57 = getelementptr inbounds <8 x double>, ptr %settings, i64 2
  %v58 = load <8 x double>, ptr %v57, align 64
  %v59 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3CF0000000000000), <8 x double> %v56, <8 x double> %v58)
  %v60 = fcmp ogt <8 x double> %v55, %v59
  %v61 = select <8 x i1> %v60, <8 x double> %v55, <8 x double> %v59
  %v62 = fcmp olt <8 x double> %v61, %v31
  %v63 = select <8 x i1> %v62, <8 x double> %v61, <8 x double> %v31
  %v64 = fdiv <8 x double> %v41, %v47
  %v65 = fcmp olt <8 x double> %v64, %v31
  %v66 = select <8 x i1> %v65, <8 x double> %v64, <8 x double> %v31
  %v67 = select <8 x i1> %v51, <8 x double> %v31, <8 x double> %v66
  %v68 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v63, <8 x double> %v27, <8 x double> %v2)
  %v69 = fadd <8 x double> %v7, %v63
  %v70 = fsub <8 x double> %v69, %v11
  %v71 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v18, <8 x double> %v70, <8 x double> %v16)
  %v72 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v71, <8 x double> %v70, <8 x double> %v14)
  %v73 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v72, <8 x double> %v70, <8 x double> %v22)
  %v74 = call <8 x double> @table.loss(<8 x double> %v68)
  %v75 = fsub <8 x double> %v73, %v68
  %v76 = fneg <8 x double> %v74
  %v77 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v9, <8 x double> %v75, <8 x double> %v76)
  %v78 = fsub <8 x double> %v77, %v27
  %v79 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v80 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v33, <8 x double> %v79, <8 x double> %v36)
  %v81 = fdiv <8 x double> %v78, %v80
  %v82 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v81, <8 x double> %v81, <8 x double> splat (double 0x0000000000000000))
  %v83 = fmul <8 x double> %v82, splat (double 0x3FF0000000000000)
  %v84 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v83)
  %v85 = fdiv <8 x double> %v84, %v63
  %v86 = fmul <8 x double> %v47, %v67
  %v87 = fmul <8 x double> %v85, %v67
  %v88 = fmul <8 x double> %v87, %v67
  %v89 = fcmp ogt <8 x double> %v86, %v88
  %v90 = select <8 x i1> %v89, <8 x double> %v86, <8 x double> %v88
  %v91 = fcmp olt <8 x double> %v90, splat (double 0x73D658E3AB795204)
  %v92 = select <8 x i1> %v91, <8 x double> %v90, <8 x double> splat (double 0x73D658E3AB795204)
  %v93 = fcmp ogt <8 x double> %v92, splat (double 0x0C06E93F5DA2824C)
  %v94 = select <8 x i1> %v93, <8 x double> %v92, <8 x double> splat (double 0x0C06E93F5DA2824C)
  %v95 = bitcast <8 x double> %v94 to <8 x i64>
  %v96 = lshr <8 x i64> %v95, splat (i64 52)
  %v97 = or <8 x i64> %v96, splat (i64 4841369599423283200)
  %v98 = bitcast <8 x i64> %v97 to <8 x double>
  %v99 = fsub <8 x double> %v98, splat (double 0x43300000000003FF)
  %v100 = and <8 x i64> %v95, splat (i64 4503599627370495)
  %v101 = or <8 x i64> %v100, splat (i64 4607182418800017408)
  %v102 = bitcast <8 x i64> %v101 to <8 x double>
  %v103 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA604C059210386), <8 x double> %v102, <8 x double> splat (double 0xBFD9C2C7904CE9BE))
  %v104 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v103, <8 x double> %v102, <8 x double> splat (double 0x3FF96E7C9A8551E4))
  %v105 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v104, <8 x double> %v102, <8 x double> splat (double 0xC00BEB4578B01506))
  %v106 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v105, <8 x double> %v102, <8 x double> splat (double 0x401431010187BF7D))
  %v107 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v106, <8 x double> %v102, <8 x double> splat (double 0xC0064DAC40654ADD))
  %v108 = fadd <8 x double> %v99, %v107
  %v109 = fmul <8 x double> %v108, splat (double 0xBFC0000000000000)
  %v110 = fadd <8 x double> %v109, splat (double 0xBFEA934F0979A371)
  %v111 = fadd <8 x double> %v110, splat (double 0x4338000000000000)
  %v112 = fsub <8 x double> %v111, splat (double 0x4338000000000000)
  %v113 = fsub <8 x double> %v110, %v112
  %v114 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F83CBFA3EF5DF15), <8 x double> %v113, <8 x double> splat (double 0x3FACA1CEF240FA9C))
  %v115 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v114, <8 x double> %v113, <8 x double> splat (double 0x3FCEBFA4C61D8623))
  %v116 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v115, <8 x double> %v113, <8 x double> splat (double 0x3FE62E0C17657753))
  %v117 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v116, <8 x double> %v113, <8 x double> splat (double 0x3FF0000000000000))
  %v118 = bitcast <8 x double> %v111 to <8 x i64>
  %v119 = shl <8 x i64> %v118, splat (i64 52)
  %v120 = bitcast <8 x double> %v117 to <8 x i64>
  %v121 = add <8 x i64> %v120, %v119
  %v122 = bitcast <8 x i64> %v121 to <8 x double>
  %v123 = fmul <8 x double> %v67, %v122
  %v124 = fmul <8 x double> %v31, splat (double 0x3EB0C6F7A0B5ED8D)
  %v125 = fmul <8 x double> %v63, splat (double 0x3F50624DD2F1A9FC)
  %v126 = fcmp ogt <8 x double> %v124, %v125
  %v127 = select <8 x i1> %v126, <8 x double> %v124, <8 x double> %v125
  %v128 = fcmp ole <8 x double> %v90, splat (double 0x3CD203AF9EE75616)
  %v129 = select <8 x i1> %v128, <8 x double> %v127, <8 x double> %v123
  %v130 = fmul <8 x double> splat (double 0x4059000000000000), %v63
  %v131 = fcmp olt <8 x double> %v130, %v129
  %v132 = select <8 x i1> %v131, <8 x double> %v130, <8 x double> %v129
  %v133 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v7)
  %v134 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3CF0000000000000), <8 x double> %v133, <8 x double> %v58)
  %v135 = fcmp ogt <8 x double> %v132, %v134
  %v136 = select <8 x i1> %v135, <8 x double> %v132, <8 x double> %v134
  %v137 = fcmp olt <8 x double> %v136, %v31
  %v138 = select <8 x i1> %v137, <8 x double> %v136, <8 x double> %v31
  %v139 = fcmp ord <8 x double> %v85, %v85
  %v140 = select <8 x i1> %v139, <8 x double> %v138, <8 x double> %v63
  %v141 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  store <8 x double> %v140, ptr %v141, align 64
  %v142 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  store <8 x double> splat (double 0xC03A934F0979A371), ptr %v142, align 64
  %v143 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  store <8 x double> splat (double 0x0000000000000000), ptr %v143, align 64
  %v144 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  store <8 x double> splat (double 0x0000000000000000), ptr %v144, align 64
  %v145 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  store <8 x double> splat (double 0x0000000000000000), ptr %v145, align 64
  %v146 = getelementptr inbounds <8 x double>, ptr %lanes, i64 13
  store <8 x double> splat (double 0x0000000000000000), ptr %v146, align 64
  %v147 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  store <8 x double> splat (double 0x0000000000000000), ptr %v147, align 64
  %v148 = getelementptr inbounds <8 x double>, ptr %lanes, i64 10
  store <8 x double> splat (double 0x3FF0000000000000), ptr %v148, align 64
  %v149 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  store <8 x double> %v7, ptr %v149, align 64
  %v150 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  store <8 x double> splat (double 0x3FF0000000000000), ptr %v150, align 64
  %v151 = getelementptr inbounds <8 x double>, ptr %settings, i64 10
  %v152 = load <8 x double>, ptr %v151, align 64
  %v153 = fcmp olt <8 x double> %v2, %v152
  %v154 = or <8 x i1> zeroinitializer, %v153
  %v155 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v156 = load <8 x double>, ptr %v155, align 64
  %v157 = fcmp ogt <8 x double> %v2, %v156
  %v158 = or <8 x i1> %v154, %v157
  %v159 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v2, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x0000000000000000))
  %v160 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v27, <8 x double> splat (double 0x0000000000000000), <8 x double> %v159)
  %v161 = fcmp uno <8 x double> %v160, %v160
  %v162 = select <8 x i1> %v158, <8 x double> splat (double 0x4000000000000000), <8 x double> splat (double 0x0000000000000000)
  %v163 = select <8 x i1> %v161, <8 x double> splat (double 0x4008000000000000), <8 x double> %v162
  %v164 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v163, ptr %v164, align 64
  %v165 = or <8 x i1> %v158, %v161
  %v166 = bitcast <8 x i1> %v165 to i8
  %v167 = zext i8 %v166 to i64
  ret i64 %v167
}

define i64 @uq_rates(ptr noalias %lanes, ptr noalias readonly %settings) #0 {
entry:
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %lanes, i64 18
  %v4 = load <8 x double>, ptr %v3, align 64
  %v5 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  %v6 = load <8 x double>, ptr %v5, align 64
  %v7 = getelementptr inbounds <8 x double>, ptr %lanes, i64 11
  %v8 = load <8 x double>, ptr %v7, align 64
  %v9 = fsub <8 x double> %v2, %v8
  %v10 = getelementptr inbounds <8 x double>, ptr %lanes, i64 21
  %v11 = load <8 x double>, ptr %v10, align 64
  %v12 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  %v13 = load <8 x double>, ptr %v12, align 64
  %v14 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  %v15 = load <8 x double>, ptr %v14, align 64
  %v16 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v15, <8 x double> %v9, <8 x double> %v13)
  %v17 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v9, <8 x double> %v11)
  %v18 = getelementptr inbounds <8 x double>, ptr %lanes, i64 20
  %v19 = load <8 x double>, ptr %v18, align 64
  %v20 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v17, <8 x double> %v9, <8 x double> %v19)
  %v21 = call <8 x double> @table.loss(<8 x double> %v6)
  %v22 = fsub <8 x double> %v20, %v6
  %v23 = fneg <8 x double> %v21
  %v24 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v4, <8 x double> %v22, <8 x double> %v23)
  %v25 = getelementptr inbounds <8 x double>, ptr %lanes, i64 13
  %v26 = load <8 x double>, ptr %v25, align 64
  %v27 = fcmp ogt <8 x double> %v26, splat (double 0x0000000000000000)
  %v28 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  %v29 = load <8 x double>, ptr %v28, align 64
  %v30 = select <8 x i1> %v27, <8 x double> %v24, <8 x double> %v29
  %v31 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  store <8 x double> %v30, ptr %v31, align 64
  %v32 = getelementptr inbounds <8 x double>, ptr %lanes, i64 13
  store <8 x double> splat (double 0x0000000000000000), ptr %v32, align 64
  %v33 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x0000000000000000))
  %v34 = fcmp uno <8 x double> %v33, %v33
  %v35 = and <8 x i1> %v27, %v34
  %v36 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  %v37 = load <8 x double>, ptr %v36, align 64
  %v38 = select <8 x i1> %v35, <8 x double> splat (double 0x4008000000000000), <8 x double> %v37
  %v39 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v38, ptr %v39, align 64
  %v40 = bitcast <8 x i1> %v35 to i8
  %v41 = zext i8 %v40 to i64
  ret i64 %v41
}

define i64 @uq_step(ptr noalias %lanes, ptr noalias readonly %settings) #1 {
entry:
  ; length of the attempt: proposed, stretched or halved towards the end of the segment
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  %v4 = load <8 x double>, ptr %v3, align 64
  %v5 = getelementptr inbounds <8 x double>, ptr %lanes, i64 2
  %v6 = load <8 x double>, ptr %v5, align 64
  %v7 = fsub <8 x double> %v6, %v2
  %v8 = fmul <8 x double> %v4, splat (double 0x3FF028F5C28F5C29)
  %v9 = fcmp oge <8 x double> %v8, %v7
  %v10 = fadd <8 x double> %v4, %v4
  %v11 = fcmp oge <8 x double> %v10, %v7
  %v12 = fmul <8 x double> %v7, splat (double 0x3FE0000000000000)
  %v13 = select <8 x i1> %v11, <8 x double> %v12, <8 x double> %v4
  %v14 = fadd <8 x double> %v2, %v13
  %v15 = select <8 x i1> %v9, <8 x double> %v6, <8 x double> %v14
  %v16 = fsub <8 x double> %v15, %v2
  ; stages
  %v17 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  %v18 = load <8 x double>, ptr %v17, align 64
  %v19 = fmul <8 x double> splat (double 0x3FAAEE6838DAE63A), %v18
  %v20 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  %v21 = load <8 x double>, ptr %v20, align 64
  %v22 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v19, <8 x double> %v21)
  %v23 = getelementptr inbounds <8 x double>, ptr %lanes, i64 18
  %v24 = load <8 x double>, ptr %v23, align 64
  %v25 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FAAEE6838DAE63A), <8 x double> %v16, <8 x double> %v2)
  %v26 = getelementptr inbounds <8 x double>, ptr %lanes, i64 11
  %v27 = load <8 x double>, ptr %v26, align 64
  %v28 = fsub <8 x double> %v25, %v27
  %v29 = getelementptr inbounds <8 x double>, ptr %lanes, i64 21
  %v30 = load <8 x double>, ptr %v29, align 64
  %v31 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  %v32 = load <8 x double>, ptr %v31, align 64
  %v33 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  %v34 = load <8 x double>, ptr %v33, align 64
  %v35 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v28, <8 x double> %v32)
  %v36 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v35, <8 x double> %v28, <8 x double> %v30)
  %v37 = getelementptr inbounds <8 x double>, ptr %lanes, i64 20
  %v38 = load <8 x double>, ptr %v37, align 64
  %v39 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v28, <8 x double> %v38)
  %v40 = call <8 x double> @table.loss(<8 x double> %v22)
  %v41 = fsub <8 x double> %v39, %v22
  %v42 = fneg <8 x double> %v40
  %v43 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v41, <8 x double> %v42)
  %v44 = fmul <8 x double> splat (double 0x3F9432CE2AA42CAC), %v18
  %v45 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FAE4C353FF64302), <8 x double> %v43, <8 x double> %v44)
  %v46 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v45, <8 x double> %v21)
  %v47 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FB432CE2AA42CAC), <8 x double> %v16, <8 x double> %v2)
  %v48 = fsub <8 x double> %v47, %v27
  %v49 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v48, <8 x double> %v32)
  %v50 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v49, <8 x double> %v48, <8 x double> %v30)
  %v51 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v50, <8 x double> %v48, <8 x double> %v38)
  %v52 = call <8 x double> @table.loss(<8 x double> %v46)
  %v53 = fsub <8 x double> %v51, %v46
  %v54 = fneg <8 x double> %v52
  %v55 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v53, <8 x double> %v54)
  %v56 = fmul <8 x double> splat (double 0x3F9E4C353FF64302), %v18
  %v57 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FB6B927EFF8B241), <8 x double> %v55, <8 x double> %v56)
  %v58 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v57, <8 x double> %v21)
  %v59 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FBE4C353FF64302), <8 x double> %v16, <8 x double> %v2)
  %v60 = fsub <8 x double> %v59, %v27
  %v61 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v60, <8 x double> %v32)
  %v62 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v61, <8 x double> %v60, <8 x double> %v30)
  %v63 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v62, <8 x double> %v60, <8 x double> %v38)
  %v64 = call <8 x double> @table.loss(<8 x double> %v58)
  %v65 = fsub <8 x double> %v63, %v58
  %v66 = fneg <8 x double> %v64
  %v67 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v65, <8 x double> %v66)
  %v68 = fmul <8 x double> splat (double 0x3FCEE50D7ECDE9FA), %v18
  %v69 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFEC4E3AB5AD1507), <8 x double> %v55, <8 x double> %v68)
  %v70 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FED983D7AC79EF5), <8 x double> %v67, <8 x double> %v69)
  %v71 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v70, <8 x double> %v21)
  %v72 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD2068C499C08D9), <8 x double> %v16, <8 x double> %v2)
  %v73 = fsub <8 x double> %v72, %v27
  %v74 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v73, <8 x double> %v32)
  %v75 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v74, <8 x double> %v73, <8 x double> %v30)
  %v76 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v75, <8 x double> %v73, <8 x double> %v38)
  %v77 = call <8 x double> @table.loss(<8 x double> %v71)
  %v78 = fsub <8 x double> %v76, %v71
  %v79 = fneg <8 x double> %v77
  %v80 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v78, <8 x double> %v79)
  %v81 = fmul <8 x double> splat (double 0x3FA2F684BDA12F68), %v18
  %v82 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC5DDB63BDB6D36), <8 x double> %v67, <8 x double> %v81)
  %v83 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC00F533F66F19A), <8 x double> %v80, <8 x double> %v82)
  %v84 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v83, <8 x double> %v21)
  %v85 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD5555555555555), <8 x double> %v16, <8 x double> %v2)
  %v86 = fsub <8 x double> %v85, %v27
  %v87 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v86, <8 x double> %v32)
  %v88 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v87, <8 x double> %v86, <8 x double> %v30)
  %v89 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v88, <8 x double> %v86, <8 x double> %v38)
  %v90 = call <8 x double> @table.loss(<8 x double> %v84)
  %v91 = fsub <8 x double> %v89, %v84
  %v92 = fneg <8 x double> %v90
  %v93 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v91, <8 x double> %v92)
  %v94 = fmul <8 x double> splat (double 0x3FA3000000000000), %v18
  %v95 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC5CAD30F3347ED), <8 x double> %v67, <8 x double> %v94)
  %v96 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FAED4B3C332E04D), <8 x double> %v80, <8 x double> %v95)
  %v97 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF92000000000000), <8 x double> %v93, <8 x double> %v96)
  %v98 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v97, <8 x double> %v21)
  %v99 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD0000000000000), <8 x double> %v16, <8 x double> %v2)
  %v100 = fsub <8 x double> %v99, %v27
  %v101 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v100, <8 x double> %v32)
  %v102 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v101, <8 x double> %v100, <8 x double> %v30)
  %v103 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v102, <8 x double> %v100, <8 x double> %v38)
  %v104 = call <8 x double> @table.loss(<8 x double> %v98)
  %v105 = fsub <8 x double> %v103, %v98
  %v106 = fneg <8 x double> %v104
  %v107 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v105, <8 x double> %v106)
  %v108 = fmul <8 x double> splat (double 0x3FA2FDB8FEE78792), %v18
  %v109 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC5CF23F6595D72), <8 x double> %v67, <8 x double> %v108)
  %v110 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FBB758640DEA698), <8 x double> %v80, <8 x double> %v109)
  %v111 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF8F5FCC20FCD32F), <8 x double> %v93, <8 x double> %v110)
  %v112 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F80F1D92EFB0B71), <8 x double> %v107, <8 x double> %v111)
  %v113 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v112, <8 x double> %v21)
  %v114 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD3B13B13B13B14), <8 x double> %v16, <8 x double> %v2)
  %v115 = fsub <8 x double> %v114, %v27
  %v116 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v115, <8 x double> %v32)
  %v117 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v116, <8 x double> %v115, <8 x double> %v30)
  %v118 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v117, <8 x double> %v115, <8 x double> %v38)
  %v119 = call <8 x double> @table.loss(<8 x double> %v113)
  %v120 = fsub <8 x double> %v118, %v113
  %v121 = fneg <8 x double> %v119
  %v122 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v120, <8 x double> %v121)
  %v123 = fmul <8 x double> splat (double 0x3FE3F8B78B985813), %v18
  %v124 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC00AE31BACC6BC8A), <8 x double> %v67, <8 x double> %v123)
  %v125 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFEBC873F08E11F9), <8 x double> %v80, <8 x double> %v124)
  %v126 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x403B9793D88D1855), <8 x double> %v93, <8 x double> %v125)
  %v127 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40342770F892AD69), <8 x double> %v107, <8 x double> %v126)
  %v128 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC045BEB4865C42F9), <8 x double> %v122, <8 x double> %v127)
  %v129 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v128, <8 x double> %v21)
  %v130 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE4D74D74D74D75), <8 x double> %v16, <8 x double> %v2)
  %v131 = fsub <8 x double> %v130, %v27
  %v132 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v131, <8 x double> %v32)
  %v133 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v132, <8 x double> %v131, <8 x double> %v30)
  %v134 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v133, <8 x double> %v131, <8 x double> %v38)
  %v135 = call <8 x double> @table.loss(<8 x double> %v129)
  %v136 = fsub <8 x double> %v134, %v129
  %v137 = fneg <8 x double> %v135
  %v138 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v136, <8 x double> %v137)
  %v139 = fmul <8 x double> splat (double 0x3FDE9205E321B655), %v18
  %v140 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC003E7A8A34BD27F), <8 x double> %v67, <8 x double> %v139)
  %v141 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFE2E3A9968C93C8), <8 x double> %v80, <8 x double> %v140)
  %v142 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40353AE4A6D655EE), <8 x double> %v93, <8 x double> %v141)
  %v143 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x402E8EF7B5F258B8), <8 x double> %v107, <8 x double> %v142)
  %v144 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC040A4E418D711B9), <8 x double> %v122, <8 x double> %v143)
  %v145 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF94D1B3D9B4A876), <8 x double> %v138, <8 x double> %v144)
  %v146 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v145, <8 x double> %v21)
  %v147 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE3333333333333), <8 x double> %v16, <8 x double> %v2)
  %v148 = fsub <8 x double> %v147, %v27
  %v149 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v148, <8 x double> %v32)
  %v150 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v149, <8 x double> %v148, <8 x double> %v30)
  %v151 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v150, <8 x double> %v148, <8 x double> %v38)
  %v152 = call <8 x double> @table.loss(<8 x double> %v146)
  %v153 = fsub <8 x double> %v151, %v146
  %v154 = fneg <8 x double> %v152
  %v155 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v153, <8 x double> %v154)
  %v156 = fmul <8 x double> splat (double 0xBFEDFD121F1D399B), %v18
  %v157 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4014BED869FB0B9D), <8 x double> %v67, <8 x double> %v156)
  %v158 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FF1768702792EA9), <8 x double> %v80, <8 x double> %v157)
  %v159 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC0204CB0E2110C1C), <8 x double> %v93, <8 x double> %v158)
  %v160 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC032852305E975A8), <8 x double> %v107, <8 x double> %v159)
  %v161 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4036BD4F06CB863A), <8 x double> %v122, <8 x double> %v160)
  %v162 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4003F2E777CF109D), <8 x double> %v138, <8 x double> %v161)
  %v163 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC0085FC60D2B572C), <8 x double> %v155, <8 x double> %v162)
  %v164 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v163, <8 x double> %v21)
  %v165 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FEB6DB6DB6DB6DB), <8 x double> %v16, <8 x double> %v2)
  %v166 = fsub <8 x double> %v165, %v27
  %v167 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v166, <8 x double> %v32)
  %v168 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v167, <8 x double> %v166, <8 x double> %v30)
  %v169 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v168, <8 x double> %v166, <8 x double> %v38)
  %v170 = call <8 x double> @table.loss(<8 x double> %v164)
  %v171 = fsub <8 x double> %v169, %v164
  %v172 = fneg <8 x double> %v170
  %v173 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v171, <8 x double> %v172)
  %v174 = fmul <8 x double> splat (double 0x40022FBD3B09FCDC), %v18
  %v175 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC02511A963CAFE55), <8 x double> %v67, <8 x double> %v174)
  %v176 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC00001C935AC72AC), <8 x double> %v80, <8 x double> %v175)
  %v177 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC031F57C8EFF3006), <8 x double> %v93, <8 x double> %v176)
  %v178 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x403BF2EA18B58A01), <8 x double> %v107, <8 x double> %v177)
  %v179 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC006DF3A7D1CEC13), <8 x double> %v122, <8 x double> %v178)
  %v180 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC021BEE71A9F33A9), <8 x double> %v138, <8 x double> %v179)
  %v181 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4028B89C42C81861), <8 x double> %v155, <8 x double> %v180)
  %v182 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE496AC6253E202), <8 x double> %v173, <8 x double> %v181)
  %v183 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v182, <8 x double> %v21)
  %v184 = fsub <8 x double> %v15, %v27
  %v185 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v184, <8 x double> %v32)
  %v186 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v185, <8 x double> %v184, <8 x double> %v30)
  %v187 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v186, <8 x double> %v184, <8 x double> %v38)
  %v188 = call <8 x double> @table.loss(<8 x double> %v183)
  %v189 = fsub <8 x double> %v187, %v183
  %v190 = fneg <8 x double> %v188
  %v191 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v189, <8 x double> %v190)
  %v192 = fmul <8 x double> splat (double 0x3FABCC6368D1177C), %v18
  %v193 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4011CD1ED2AD5AE2), <8 x double> %v93, <8 x double> %v192)
  %v194 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FFE43A845D5AB9F), <8 x double> %v107, <8 x double> %v193)
  %v195 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC017346ECF96AF43), <8 x double> %v122, <8 x double> %v194)
  %v196 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD3EA1DF2F0EB98), <8 x double> %v138, <8 x double> %v195)
  %v197 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFC37A028F43B002), <8 x double> %v155, <8 x double> %v196)
  %v198 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC9C657697FE72D), <8 x double> %v173, <8 x double> %v197)
  %v199 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA6E44F50AB6BC2), <8 x double> %v191, <8 x double> %v198)
  %v200 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v199, <8 x double> %v21)
  %v201 = fsub <8 x double> %v15, %v27
  %v202 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v201, <8 x double> %v32)
  %v203 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v202, <8 x double> %v201, <8 x double> %v30)
  %v204 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v203, <8 x double> %v201, <8 x double> %v38)
  %v205 = call <8 x double> @table.loss(<8 x double> %v200)
  %v206 = fsub <8 x double> %v204, %v200
  %v207 = fneg <8 x double> %v205
  %v208 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v206, <8 x double> %v207)
  ; error in units of the tolerance, squared, averaged over the states
  %v209 = getelementptr inbounds <8 x double>, ptr %settings, i64 0
  %v210 = load <8 x double>, ptr %v209, align 64
  %v211 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v21)
  %v212 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v200)
  %v213 = fcmp ogt <8 x double> %v211, %v212
  %v214 = select <8 x i1> %v213, <8 x double> %v211, <8 x double> %v212
  %v215 = getelementptr inbounds <8 x double>, ptr %settings, i64 9
  %v216 = load <8 x double>, ptr %v215, align 64
  %v217 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v210, <8 x double> %v214, <8 x double> %v216)
  %v218 = fmul <8 x double> splat (double 0x3F8ADEAEA1607E1A), %v18
  %v219 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFF39A3DA55AB5C3), <8 x double> %v93, <8 x double> %v218)
  %v220 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFDFBA83BEDE8A72), <8 x double> %v107, <8 x double> %v219)
  %v221 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FFAA149F7EDA509), <8 x double> %v122, <8 x double> %v220)
  %v222 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD66BC9B10E7E71), <8 x double> %v138, <8 x double> %v221)
  %v223 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD56330D0783989), <8 x double> %v155, <8 x double> %v222)
  %v224 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FB4F8EB54A31435), <8 x double> %v173, <8 x double> %v223)
  %v225 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF96E44F50AB6BC2), <8 x double> %v191, <8 x double> %v224)
  %v226 = fmul <8 x double> %v16, %v225
  %v227 = fdiv <8 x double> %v226, %v217
  %v228 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v227, <8 x double> %v227, <8 x double> splat (double 0x0000000000000000))
  %v229 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v21)
  %v230 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v200)
  %v231 = fcmp ogt <8 x double> %v229, %v230
  %v232 = select <8 x i1> %v231, <8 x double> %v229, <8 x double> %v230
  %v233 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v210, <8 x double> %v232, <8 x double> %v216)
  %v234 = fmul <8 x double> splat (double 0xBFC84B641FBFA1F1), %v18
  %v235 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4011CD1ED2AD5AE2), <8 x double> %v93, <8 x double> %v234)
  %v236 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FFE43A845D5AB9F), <8 x double> %v107, <8 x double> %v235)
  %v237 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC017346ECF96AF43), <8 x double> %v122, <8 x double> %v236)
  %v238 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFDB0D3A26ABB717), <8 x double> %v138, <8 x double> %v237)
  %v239 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFC37A028F43B002), <8 x double> %v155, <8 x double> %v238)
  %v240 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC9C657697FE72D), <8 x double> %v173, <8 x double> %v239)
  %v241 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F9732080AC040EE), <8 x double> %v191, <8 x double> %v240)
  %v242 = fmul <8 x double> %v16, %v241
  %v243 = fdiv <8 x double> %v242, %v233
  %v244 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v243, <8 x double> %v243, <8 x double> splat (double 0x0000000000000000))
  %v245 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F847AE147AE147B), <8 x double> %v244, <8 x double> %v228)
  %v246 = fcmp oeq <8 x double> %v245, splat (double 0x0000000000000000)
  %v247 = fdiv <8 x double> %v228, %v245
  %v248 = select <8 x i1> %v246, <8 x double> splat (double 0x0000000000000000), <8 x double> %v247
  %v249 = fmul <8 x double> %v228, %v248
  %v250 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v200, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x0000000000000000))
  %v251 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v208, <8 x double> splat (double 0x0000000000000000), <8 x double> %v250)
  %v252 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v249, <8 x double> splat (double 0x3FF0000000000000), <8 x double> %v251)
  ; accepted or refused, and the next length
  %v253 = getelementptr inbounds <8 x double>, ptr %lanes, i64 10
  %v254 = load <8 x double>, ptr %v253, align 64
  %v255 = fcmp ogt <8 x double> %v254, splat (double 0x0000000000000000)
  %v256 = fcmp ole <8 x double> %v252, splat (double 0x3FF0000000000000)
  %v257 = and <8 x i1> %v255, %v256
  %v258 = fcmp olt <8 x double> %v252, splat (double 0x46293E5939A08CEA)
  %v259 = select <8 x i1> %v258, <8 x double> %v252, <8 x double> splat (double 0x46293E5939A08CEA)
  %v260 = fcmp ogt <8 x double> %v259, splat (double 0x39B4484BFEEBC2A0)
  %v261 = select <8 x i1> %v260, <8 x double> %v259, <8 x double> splat (double 0x39B4484BFEEBC2A0)
  %v262 = bitcast <8 x double> %v261 to <8 x i64>
  %v263 = lshr <8 x i64> %v262, splat (i64 52)
  %v264 = or <8 x i64> %v263, splat (i64 4841369599423283200)
  %v265 = bitcast <8 x i64> %v264 to <8 x double>
  %v266 = fsub <8 x double> %v265, splat (double 0x43300000000003FF)
  %v267 = and <8 x i64> %v262, splat (i64 4503599627370495)
  %v268 = or <8 x i64> %v267, splat (i64 4607182418800017408)
  %v269 = bitcast <8 x i64> %v268 to <8 x double>
  %v270 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA604C059210386), <8 x double> %v269, <8 x double> splat (double 0xBFD9C2C7904CE9BE))
  %v271 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v270, <8 x double> %v269, <8 x double> splat (double 0x3FF96E7C9A8551E4))
  %v272 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v271, <8 x double> %v269, <8 x double> splat (double 0xC00BEB4578B01506))
  %v273 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v272, <8 x double> %v269, <8 x double> splat (double 0x401431010187BF7D))
  %v274 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v273, <8 x double> %v269, <8 x double> splat (double 0xC0064DAC40654ADD))
  %v275 = fadd <8 x double> %v266, %v274
  %v276 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  %v277 = load <8 x double>, ptr %v276, align 64
  %v278 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v277, <8 x double> splat (double 0x3F947AE147AE147B), <8 x double> splat (double 0xBFC374D65D9E608D))
  %v279 = select <8 x i1> %v257, <8 x double> %v278, <8 x double> splat (double 0xBFC374D65D9E608D)
  %v280 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v275, <8 x double> splat (double 0xBFADF3B645A1CAC0), <8 x double> %v279)
  %v281 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  %v282 = load <8 x double>, ptr %v281, align 64
  %v283 = fcmp ogt <8 x double> %v282, splat (double 0x0000000000000000)
  %v284 = xor <8 x i1> %v257, splat (i1 true)
  %v285 = or <8 x i1> %v283, %v284
  %v286 = select <8 x i1> %v285, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x4004AE00D1CFDEB4)
  %v287 = fcmp olt <8 x double> %v280, %v286
  %v288 = select <8 x i1> %v287, <8 x double> %v280, <8 x double> %v286
  %v289 = fcmp ogt <8 x double> %v288, splat (double 0xBFF961EB2BE3BC44)
  %v290 = select <8 x i1> %v289, <8 x double> %v288, <8 x double> splat (double 0xBFF961EB2BE3BC44)
  %v291 = fadd <8 x double> %v290, splat (double 0x4338000000000000)
  %v292 = fsub <8 x double> %v291, splat (double 0x4338000000000000)
  %v293 = fsub <8 x double> %v290, %v292
  %v294 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F83CBFA3EF5DF15), <8 x double> %v293, <8 x double> splat (double 0x3FACA1CEF240FA9C))
  %v295 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v294, <8 x double> %v293, <8 x double> splat (double 0x3FCEBFA4C61D8623))
  %v296 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v295, <8 x double> %v293, <8 x double> splat (double 0x3FE62E0C17657753))
  %v297 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v296, <8 x double> %v293, <8 x double> splat (double 0x3FF0000000000000))
  %v298 = bitcast <8 x double> %v291 to <8 x i64>
  %v299 = shl <8 x i64> %v298, splat (i64 52)
  %v300 = bitcast <8 x double> %v297 to <8 x i64>
  %v301 = add <8 x i64> %v300, %v299
  %v302 = bitcast <8 x i64> %v301 to <8 x double>
  %v303 = fmul <8 x double> %v16, %v302
  %v304 = fcmp oge <8 x double> %v302, splat (double 0x3FF0000000000000)
  %v305 = fcmp ogt <8 x double> %v4, %v303
  %v306 = and <8 x i1> %v304, %v305
  %v307 = and <8 x i1> %v257, %v306
  %v308 = select <8 x i1> %v307, <8 x double> %v4, <8 x double> %v303
  %v309 = fcmp ogt <8 x double> %v275, splat (double 0xC03A934F0979A371)
  %v310 = select <8 x i1> %v309, <8 x double> %v275, <8 x double> splat (double 0xC03A934F0979A371)
  ; what the lane is now
  %v311 = fcmp ogt <8 x double> %v254, splat (double 0x0000000000000000)
  %v312 = xor <8 x i1> %v257, splat (i1 true)
  %v313 = and <8 x i1> %v311, %v312
  %v314 = select <8 x i1> %v257, <8 x double> %v15, <8 x double> %v2
  %v315 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  store <8 x double> %v314, ptr %v315, align 64
  %v316 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v317 = load <8 x double>, ptr %v316, align 64
  %v318 = select <8 x i1> %v257, <8 x double> %v2, <8 x double> %v317
  %v319 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  store <8 x double> %v318, ptr %v319, align 64
  %v320 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v321 = load <8 x double>, ptr %v320, align 64
  %v322 = select <8 x i1> %v257, <8 x double> %v16, <8 x double> %v321
  %v323 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  store <8 x double> %v322, ptr %v323, align 64
  %v324 = select <8 x i1> %v257, <8 x double> %v310, <8 x double> %v277
  %v325 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  store <8 x double> %v324, ptr %v325, align 64
  %v326 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  store <8 x double> %v308, ptr %v326, align 64
  %v327 = select <8 x i1> %v313, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v328 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  store <8 x double> %v327, ptr %v328, align 64
  %v329 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  %v330 = load <8 x double>, ptr %v329, align 64
  %v331 = fmul <8 x double> %v330, splat (double 0x3FE0000000000000)
  %v332 = select <8 x i1> %v257, <8 x double> %v331, <8 x double> %v330
  %v333 = fcmp olt <8 x double> %v252, splat (double 0x7FF0000000000000)
  %v334 = select <8 x i1> %v333, <8 x double> %v332, <8 x double> splat (double 0x3FF0000000000000)
  %v335 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  store <8 x double> %v334, ptr %v335, align 64
  %v336 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  %v337 = load <8 x double>, ptr %v336, align 64
  %v338 = select <8 x i1> %v257, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v339 = fadd <8 x double> %v337, %v338
  %v340 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  %v341 = load <8 x double>, ptr %v340, align 64
  %v342 = select <8 x i1> %v313, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v343 = fadd <8 x double> %v341, %v342
  %v344 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  store <8 x double> %v339, ptr %v344, align 64
  %v345 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  store <8 x double> %v343, ptr %v345, align 64
  ; who needs attention
  %v346 = and <8 x i1> %v257, %v9
  %v347 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v348 = getelementptr inbounds <8 x double>, ptr %settings, i64 2
  %v349 = load <8 x double>, ptr %v348, align 64
  %v350 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3CF0000000000000), <8 x double> %v347, <8 x double> %v349)
  %v351 = fcmp olt <8 x double> %v308, %v350
  %v352 = fadd <8 x double> %v339, %v343
  %v353 = getelementptr inbounds <8 x double>, ptr %settings, i64 1
  %v354 = load <8 x double>, ptr %v353, align 64
  %v355 = fcmp oge <8 x double> %v352, %v354
  %v356 = fcmp ogt <8 x double> %v254, splat (double 0x0000000000000000)
  %v357 = xor <8 x i1> %v346, splat (i1 true)
  %v358 = and <8 x i1> %v356, %v357
  %v359 = or <8 x i1> %v351, %v355
  %v360 = and <8 x i1> %v358, %v359
  %v361 = getelementptr inbounds <8 x double>, ptr %settings, i64 10
  %v362 = load <8 x double>, ptr %v361, align 64
  %v363 = fcmp olt <8 x double> %v200, %v362
  %v364 = or <8 x i1> zeroinitializer, %v363
  %v365 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v366 = load <8 x double>, ptr %v365, align 64
  %v367 = fcmp ogt <8 x double> %v200, %v366
  %v368 = or <8 x i1> %v364, %v367
  %v369 = and <8 x i1> %v257, %v368
  %v370 = or <8 x i1> %v360, %v369
  %v371 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  %v372 = load <8 x double>, ptr %v371, align 64
  %v373 = fcmp olt <8 x double> %v372, %v15
  %v374 = fcmp ole <8 x double> %v372, %v15
  %v375 = or <8 x i1> %v346, %v370
  %v376 = select <8 x i1> %v375, <8 x i1> %v373, <8 x i1> %v374
  %v377 = and <8 x i1> %v257, %v376
  %v378 = bitcast <8 x i1> %v346 to i8
  %v379 = zext i8 %v378 to i64
  %v380 = bitcast <8 x i1> %v370 to i8
  %v381 = zext i8 %v380 to i64
  %v382 = bitcast <8 x i1> %v377 to i8
  %v383 = icmp ne i8 %v382, 0
  br i1 %v383, label %curve, label %move
curve:
  %v384 = fmul <8 x double> splat (double 0x3FACC1FCA2CEB148), %v18
  %v385 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD03958F21A35B8), <8 x double> %v107, <8 x double> %v384)
  %v386 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFCF84C2C277C23E), <8 x double> %v122, <8 x double> %v385)
  %v387 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFBFCB02555C9DEF), <8 x double> %v138, <8 x double> %v386)
  %v388 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC39F10CE2D1913), <8 x double> %v155, <8 x double> %v387)
  %v389 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F80CBB69B38652C), <8 x double> %v173, <8 x double> %v388)
  %v390 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F7EFF840F396BA9), <8 x double> %v191, <8 x double> %v389)
  %v391 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF80FE8AB4FA4830), <8 x double> %v208, <8 x double> %v390)
  %v392 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v391, <8 x double> %v21)
  %v393 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FB999999999999A), <8 x double> %v16, <8 x double> %v2)
  %v394 = fsub <8 x double> %v393, %v27
  %v395 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v394, <8 x double> %v32)
  %v396 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v395, <8 x double> %v394, <8 x double> %v30)
  %v397 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v396, <8 x double> %v394, <8 x double> %v38)
  %v398 = call <8 x double> @table.loss(<8 x double> %v392)
  %v399 = fsub <8 x double> %v397, %v392
  %v400 = fneg <8 x double> %v398
  %v401 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v399, <8 x double> %v400)
  %v402 = fmul <8 x double> splat (double 0x3FA04CA1897BDB63), %v18
  %v403 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F9CFAE9E5F59F45), <8 x double> %v93, <8 x double> %v402)
  %v404 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FAB69DB017C8CF9), <8 x double> %v107, <8 x double> %v403)
  %v405 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFAC1EF72FC69469), <8 x double> %v122, <8 x double> %v404)
  %v406 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF1C6710EEF6E153), <8 x double> %v173, <8 x double> %v405)
  %v407 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F39127A52D32320), <8 x double> %v191, <8 x double> %v406)
  %v408 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF36500E13E7149B), <8 x double> %v208, <8 x double> %v407)
  %v409 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC21686B20CD989), <8 x double> %v401, <8 x double> %v408)
  %v410 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v409, <8 x double> %v21)
  %v411 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC999999999999A), <8 x double> %v16, <8 x double> %v2)
  %v412 = fsub <8 x double> %v411, %v27
  %v413 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v412, <8 x double> %v32)
  %v414 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v413, <8 x double> %v412, <8 x double> %v30)
  %v415 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v414, <8 x double> %v412, <8 x double> %v38)
  %v416 = call <8 x double> @table.loss(<8 x double> %v410)
  %v417 = fsub <8 x double> %v415, %v410
  %v418 = fneg <8 x double> %v416
  %v419 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v417, <8 x double> %v418)
  %v420 = fmul <8 x double> splat (double 0xBFDB7309792B6015), %v18
  %v421 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC012CA5D44AFDC9A), <8 x double> %v93, <8 x double> %v420)
  %v422 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x401EBBD2C419EDA3), <8 x double> %v107, <8 x double> %v421)
  %v423 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x401046A54457171C), <8 x double> %v122, <8 x double> %v422)
  %v424 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD6D49E44EDBA44), <8 x double> %v138, <8 x double> %v423)
  %v425 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF56EBEEC24871D4), <8 x double> %v208, <8 x double> %v424)
  %v426 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40079482A23F1996), <8 x double> %v401, <8 x double> %v425)
  %v427 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC0224D4A6DCA2222), <8 x double> %v419, <8 x double> %v426)
  %v428 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v427, <8 x double> %v21)
  %v429 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE8E38E38E38E39), <8 x double> %v16, <8 x double> %v2)
  %v430 = fsub <8 x double> %v429, %v27
  %v431 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v34, <8 x double> %v430, <8 x double> %v32)
  %v432 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v431, <8 x double> %v430, <8 x double> %v30)
  %v433 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v432, <8 x double> %v430, <8 x double> %v38)
  %v434 = call <8 x double> @table.loss(<8 x double> %v428)
  %v435 = fsub <8 x double> %v433, %v428
  %v436 = fneg <8 x double> %v434
  %v437 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v24, <8 x double> %v435, <8 x double> %v436)
  %v438 = fsub <8 x double> %v200, %v21
  %v439 = fneg <8 x double> %v438
  %v440 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v18, <8 x double> %v439)
  %v441 = fneg <8 x double> %v16
  %v442 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v441, <8 x double> %v208, <8 x double> %v438)
  %v443 = fsub <8 x double> %v442, %v440
  %v444 = fmul <8 x double> splat (double 0xC017FFCF40778FE8), %v18
  %v445 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x406756BE2D49449B), <8 x double> %v93, <8 x double> %v444)
  %v446 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4050F979A6EF143D), <8 x double> %v107, <8 x double> %v445)
  %v447 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC06FDC161F75878B), <8 x double> %v122, <8 x double> %v446)
  %v448 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x401A2AD3BCF43236), <8 x double> %v138, <8 x double> %v447)
  %v449 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC027B6280D6CDE88), <8 x double> %v155, <8 x double> %v448)
  %v450 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFE2CBA6A345B54E), <8 x double> %v173, <8 x double> %v449)
  %v451 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FDB4DA1791E6C4D), <8 x double> %v191, <8 x double> %v450)
  %v452 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FDA9AA39770137E), <8 x double> %v208, <8 x double> %v451)
  %v453 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40118FCC36F797DE), <8 x double> %v401, <8 x double> %v452)
  %v454 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x401C710434C35F77), <8 x double> %v419, <8 x double> %v453)
  %v455 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFC6260E6CDE786D), <8 x double> %v437, <8 x double> %v454)
  %v456 = fmul <8 x double> %v16, %v455
  %v457 = fmul <8 x double> splat (double 0x4015B0E57908B579), %v18
  %v458 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC088EC8C4E0A4630), <8 x double> %v93, <8 x double> %v457)
  %v459 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC0671A318C2B10AD), <8 x double> %v107, <8 x double> %v458)
  %v460 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x408EAC6ACED0185C), <8 x double> %v122, <8 x double> %v459)
  %v461 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC057C68FDCED13F4), <8 x double> %v138, <8 x double> %v460)
  %v462 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4060ADEAC863ADB9), <8 x double> %v155, <8 x double> %v461)
  %v463 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC008C1C3BCB0C449), <8 x double> %v173, <8 x double> %v462)
  %v464 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC005F1515D2A9B03), <8 x double> %v191, <8 x double> %v463)
  %v465 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4017F06BABEAEEE9), <8 x double> %v208, <8 x double> %v464)
  %v466 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4014BDF774DFFBDB), <8 x double> %v401, <8 x double> %v465)
  %v467 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC048876A10BD707C), <8 x double> %v419, <8 x double> %v466)
  %v468 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE9C142EED0DA0B), <8 x double> %v437, <8 x double> %v467)
  %v469 = fmul <8 x double> %v16, %v468
  %v470 = fmul <8 x double> splat (double 0x401D8A81583D8F75), %v18
  %v471 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC0910241DA271D40), <8 x double> %v93, <8 x double> %v470)
  %v472 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC07B188FED11715D), <8 x double> %v107, <8 x double> %v471)
  %v473 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40979052CDA53113), <8 x double> %v122, <8 x double> %v472)
  %v474 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC02CA5F65F1D4E6B), <8 x double> %v138, <8 x double> %v473)
  %v475 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x403D20F115350AE3), <8 x double> %v155, <8 x double> %v474)
  %v476 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4013D30765CB0015), <8 x double> %v173, <8 x double> %v475)
  %v477 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFC18EB3C656D8CE), <8 x double> %v191, <8 x double> %v476)
  %v478 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC003444049AD2426), <8 x double> %v208, <8 x double> %v477)
  %v479 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x402490218022BA78), <8 x double> %v401, <8 x double> %v478)
  %v480 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC035BDD922FFB71C), <8 x double> %v419, <8 x double> %v479)
  %v481 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FEC1AF60348B240), <8 x double> %v437, <8 x double> %v480)
  %v482 = fmul <8 x double> %v16, %v481
  %v483 = fmul <8 x double> splat (double 0x3FF23BA98F317DA3), %v18
  %v484 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40B162C3A5F94D5C), <8 x double> %v93, <8 x double> %v483)
  %v485 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40940E4850D34534), <8 x double> %v107, <8 x double> %v484)
  %v486 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC0B61DD19AA2311F), <8 x double> %v122, <8 x double> %v485)
  %v487 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4078DAA4500CB211), <8 x double> %v138, <8 x double> %v486)
  %v488 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC081B70CE75F88C2), <8 x double> %v155, <8 x double> %v487)
  %v489 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC023B4BEC07A0FB4), <8 x double> %v173, <8 x double> %v488)
  %v490 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C1D0D36DBE4C0), <8 x double> %v191, <8 x double> %v489)
  %v491 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC0119E5101120203), <8 x double> %v208, <8 x double> %v490)
  %v492 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC05694DC60C6DF15), <8 x double> %v401, <8 x double> %v491)
  %v493 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40690E331AB6E6D6), <8 x double> %v419, <8 x double> %v492)
  %v494 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC00E82BC9582C723), <8 x double> %v437, <8 x double> %v493)
  %v495 = fmul <8 x double> %v16, %v494
  %v496 = getelementptr inbounds <8 x double>, ptr %lanes, i64 27
  store <8 x double> %v21, ptr %v496, align 64
  %v497 = getelementptr inbounds <8 x double>, ptr %lanes, i64 28
  store <8 x double> %v438, ptr %v497, align 64
  %v498 = getelementptr inbounds <8 x double>, ptr %lanes, i64 29
  store <8 x double> %v440, ptr %v498, align 64
  %v499 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  store <8 x double> %v443, ptr %v499, align 64
  %v500 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  store <8 x double> %v456, ptr %v500, align 64
  %v501 = getelementptr inbounds <8 x double>, ptr %lanes, i64 32
  store <8 x double> %v469, ptr %v501, align 64
  %v502 = getelementptr inbounds <8 x double>, ptr %lanes, i64 33
  store <8 x double> %v482, ptr %v502, align 64
  %v503 = getelementptr inbounds <8 x double>, ptr %lanes, i64 34
  store <8 x double> %v495, ptr %v503, align 64
  br label %move
move:
  %v504 = select <8 x i1> %v257, <8 x double> %v200, <8 x double> %v21
  %v505 = select <8 x i1> %v257, <8 x double> %v208, <8 x double> %v18
  %v506 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  store <8 x double> %v504, ptr %v506, align 64
  %v507 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  store <8 x double> %v505, ptr %v507, align 64
  %v508 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  %v509 = load <8 x double>, ptr %v508, align 64
  %v510 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v504)
  %v511 = fcmp ogt <8 x double> %v509, %v510
  %v512 = select <8 x i1> %v511, <8 x double> %v509, <8 x double> %v510
  %v513 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  store <8 x double> %v512, ptr %v513, align 64
  %v514 = or i64 %v379, %v381
  br i1 %v383, label %observe, label %judge
observe:
  %v515 = bitcast <8 x i1> %v377 to i8
  %v516 = zext i8 %v515 to i64
  %v517 = call i64 @uq_observe(ptr %lanes, ptr %settings, i64 %v516, i64 %v514)
  br label %judge
judge:
  %v518 = phi i64 [ 0, %move ], [ %v517, %observe ]
  %v519 = trunc i64 %v518 to i8
  %v520 = bitcast i8 %v519 to <8 x i1>
  %v521 = or <8 x i1> %v369, %v520
  %v522 = or <8 x i1> %v360, %v521
  %v523 = bitcast <8 x i1> %v522 to i8
  %v524 = zext i8 %v523 to i64
  %v525 = bitcast <8 x i1> %v522 to i8
  %v526 = icmp ne i8 %v525, 0
  br i1 %v526, label %failure, label %done
failure:
  %v527 = fcmp ogt <8 x double> %v334, splat (double 0x3F50000000000000)
  %v528 = select <8 x i1> %v527, <8 x double> splat (double 0x4008000000000000), <8 x double> splat (double 0x401C000000000000)
  %v529 = fmul <8 x double> %v350, splat (double 0x40C3880000000000)
  %v530 = getelementptr inbounds <8 x double>, ptr %settings, i64 3
  %v531 = load <8 x double>, ptr %v530, align 64
  %v532 = fmul <8 x double> %v504, %v505
  %v533 = fcmp ogt <8 x double> %v532, splat (double 0x0000000000000000)
  %v534 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v504)
  %v535 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v505)
  %v536 = fmul <8 x double> %v529, %v535
  %v537 = fcmp ole <8 x double> %v534, %v536
  %v538 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v504)
  %v539 = fcmp ogt <8 x double> %v538, splat (double 0x5F138D352E5096AF)
  %v540 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v504)
  %v541 = fmul <8 x double> %v210, %v540
  %v542 = fmul <8 x double> %v216, splat (double 0x412E848000000000)
  %v543 = fcmp ogt <8 x double> %v541, %v542
  %v544 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v504)
  %v545 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v505)
  %v546 = fmul <8 x double> %v531, %v545
  %v547 = fcmp ole <8 x double> %v544, %v546
  %v548 = and <8 x i1> %v543, %v547
  %v549 = or <8 x i1> %v537, %v539
  %v550 = or <8 x i1> %v549, %v548
  %v551 = and <8 x i1> %v533, %v550
  %v552 = or <8 x i1> zeroinitializer, %v551
  %v553 = select <8 x i1> %v552, <8 x double> splat (double 0x4010000000000000), <8 x double> %v528
  %v554 = select <8 x i1> %v351, <8 x double> %v553, <8 x double> splat (double 0x4014000000000000)
  %v555 = select <8 x i1> %v521, <8 x double> splat (double 0x4000000000000000), <8 x double> %v554
  %v556 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v555, ptr %v556, align 64
  br label %done
done:
  %v557 = shl i64 %v524, 8
  %v558 = or i64 %v379, %v557
  ret i64 %v558
}

define i64 @uq_observe(ptr noalias %lanes, ptr noalias readonly %settings, i64 %due, i64 %strict) #0 {
entry:
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = trunc i64 %due to i8
  %v4 = bitcast i8 %v3 to <8 x i1>
  %v5 = trunc i64 %strict to i8
  %v6 = bitcast i8 %v5 to <8 x i1>
  %v7 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  %v8 = load <8 x double>, ptr %v7, align 64
  %v9 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 15
  %v10 = load <8 x i64>, ptr %v9, align 64
  %v11 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 16
  %v12 = load <8 x i64>, ptr %v11, align 64
  %v13 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 17
  %v14 = load <8 x i64>, ptr %v13, align 64
  br label %next
next:
  %due.now = phi <8 x i1> [ %v4, %entry ], [ %due.then, %values ]
  %at.now = phi <8 x double> [ %v8, %entry ], [ %at.then, %values ]
  %clock.now = phi <8 x i64> [ %v10, %entry ], [ %clock.then, %values ]
  %place.now = phi <8 x i64> [ %v12, %entry ], [ %place.then, %values ]
  %truth_place.now = phi <8 x i64> [ %v14, %entry ], [ %truth_place.then, %values ]
  %strayed.now = phi <8 x i1> [ zeroinitializer, %entry ], [ %strayed.then, %values ]
  %v15 = getelementptr inbounds <8 x double>, ptr %settings, i64 5
  %v16 = load <8 x double>, ptr %v15, align 64
  %v17 = fcmp ogt <8 x double> %v16, splat (double 0x0000000000000000)
  %v18 = bitcast <8 x i1> %v17 to i8
  %v19 = icmp ne i8 %v18, 0
  br i1 %v19, label %judge, label %values
judge:
  %v20 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v21 = load <8 x double>, ptr %v20, align 64
  %v22 = fsub <8 x double> %at.now, %v21
  %v23 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v24 = load <8 x double>, ptr %v23, align 64
  %v25 = fdiv <8 x double> %v22, %v24
  %v26 = fsub <8 x double> splat (double 0x3FF0000000000000), %v25
  %v27 = fcmp oge <8 x double> %at.now, %v2
  %v28 = getelementptr inbounds <8 x double>, ptr %lanes, i64 34
  %v29 = load <8 x double>, ptr %v28, align 64
  %v30 = getelementptr inbounds <8 x double>, ptr %lanes, i64 33
  %v31 = load <8 x double>, ptr %v30, align 64
  %v32 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v29, <8 x double> %v31)
  %v33 = getelementptr inbounds <8 x double>, ptr %lanes, i64 32
  %v34 = load <8 x double>, ptr %v33, align 64
  %v35 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> %v32, <8 x double> %v34)
  %v36 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  %v37 = load <8 x double>, ptr %v36, align 64
  %v38 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v35, <8 x double> %v37)
  %v39 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  %v40 = load <8 x double>, ptr %v39, align 64
  %v41 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> %v38, <8 x double> %v40)
  %v42 = getelementptr inbounds <8 x double>, ptr %lanes, i64 29
  %v43 = load <8 x double>, ptr %v42, align 64
  %v44 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v41, <8 x double> %v43)
  %v45 = getelementptr inbounds <8 x double>, ptr %lanes, i64 28
  %v46 = load <8 x double>, ptr %v45, align 64
  %v47 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> %v44, <8 x double> %v46)
  %v48 = getelementptr inbounds <8 x double>, ptr %lanes, i64 27
  %v49 = load <8 x double>, ptr %v48, align 64
  %v50 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v47, <8 x double> %v49)
  %v51 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  %v52 = load <8 x double>, ptr %v51, align 64
  %v53 = select <8 x i1> %v27, <8 x double> %v52, <8 x double> %v50
  %v54 = getelementptr inbounds <8 x double>, ptr %settings, i64 10
  %v55 = load <8 x double>, ptr %v54, align 64
  %v56 = fcmp olt <8 x double> %v53, %v55
  %v57 = or <8 x i1> zeroinitializer, %v56
  %v58 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v59 = load <8 x double>, ptr %v58, align 64
  %v60 = fcmp ogt <8 x double> %v53, %v59
  %v61 = or <8 x i1> %v57, %v60
  %v62 = and <8 x i1> %due.now, %v61
  %v63 = xor <8 x i1> %v62, splat (i1 true)
  %v64 = and <8 x i1> %due.now, %v63
  %v65 = or <8 x i1> %strayed.now, %v62
  br label %values
values:
  %due.good = phi <8 x i1> [ %due.now, %next ], [ %v64, %judge ]
  %strayed.then = phi <8 x i1> [ %strayed.now, %next ], [ %v65, %judge ]
  %v66 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v67 = load <8 x double>, ptr %v66, align 64
  %v68 = fsub <8 x double> %at.now, %v67
  %v69 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v70 = load <8 x double>, ptr %v69, align 64
  %v71 = fdiv <8 x double> %v68, %v70
  %v72 = fsub <8 x double> splat (double 0x3FF0000000000000), %v71
  %v73 = fcmp oge <8 x double> %at.now, %v2
  %v74 = getelementptr inbounds <8 x double>, ptr %lanes, i64 34
  %v75 = load <8 x double>, ptr %v74, align 64
  %v76 = getelementptr inbounds <8 x double>, ptr %lanes, i64 33
  %v77 = load <8 x double>, ptr %v76, align 64
  %v78 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v71, <8 x double> %v75, <8 x double> %v77)
  %v79 = getelementptr inbounds <8 x double>, ptr %lanes, i64 32
  %v80 = load <8 x double>, ptr %v79, align 64
  %v81 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v72, <8 x double> %v78, <8 x double> %v80)
  %v82 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  %v83 = load <8 x double>, ptr %v82, align 64
  %v84 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v71, <8 x double> %v81, <8 x double> %v83)
  %v85 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  %v86 = load <8 x double>, ptr %v85, align 64
  %v87 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v72, <8 x double> %v84, <8 x double> %v86)
  %v88 = getelementptr inbounds <8 x double>, ptr %lanes, i64 29
  %v89 = load <8 x double>, ptr %v88, align 64
  %v90 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v71, <8 x double> %v87, <8 x double> %v89)
  %v91 = getelementptr inbounds <8 x double>, ptr %lanes, i64 28
  %v92 = load <8 x double>, ptr %v91, align 64
  %v93 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v72, <8 x double> %v90, <8 x double> %v92)
  %v94 = getelementptr inbounds <8 x double>, ptr %lanes, i64 27
  %v95 = load <8 x double>, ptr %v94, align 64
  %v96 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v71, <8 x double> %v93, <8 x double> %v95)
  %v97 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  %v98 = load <8 x double>, ptr %v97, align 64
  %v99 = select <8 x i1> %v73, <8 x double> %v98, <8 x double> %v96
  %v100 = getelementptr inbounds <8 x i64>, ptr %settings, i64 8
  %v101 = load <8 x i64>, ptr %v100, align 64
  %v102 = getelementptr inbounds <8 x i64>, ptr %settings, i64 7
  %v103 = load <8 x i64>, ptr %v102, align 64
  %v104 = getelementptr inbounds <8 x i64>, ptr %settings, i64 6
  %v105 = load <8 x i64>, ptr %v104, align 64
  %v106 = select <8 x i1> %due.good, <8 x i64> %place.now, <8 x i64> %v101
  %v107 = extractelement <8 x i64> %v106, i64 0
  %v108 = extractelement <8 x i64> %v106, i64 1
  %v109 = extractelement <8 x i64> %v106, i64 2
  %v110 = extractelement <8 x i64> %v106, i64 3
  %v111 = extractelement <8 x i64> %v106, i64 4
  %v112 = extractelement <8 x i64> %v106, i64 5
  %v113 = extractelement <8 x i64> %v106, i64 6
  %v114 = extractelement <8 x i64> %v106, i64 7
  %v115 = inttoptr i64 %v107 to ptr
  %v116 = inttoptr i64 %v108 to ptr
  %v117 = inttoptr i64 %v109 to ptr
  %v118 = inttoptr i64 %v110 to ptr
  %v119 = inttoptr i64 %v111 to ptr
  %v120 = inttoptr i64 %v112 to ptr
  %v121 = inttoptr i64 %v113 to ptr
  %v122 = inttoptr i64 %v114 to ptr
  %v123 = extractelement <8 x double> %v99, i64 0
  store double %v123, ptr %v115, align 8
  %v124 = extractelement <8 x double> %v99, i64 1
  store double %v124, ptr %v116, align 8
  %v125 = extractelement <8 x double> %v99, i64 2
  store double %v125, ptr %v117, align 8
  %v126 = extractelement <8 x double> %v99, i64 3
  store double %v126, ptr %v118, align 8
  %v127 = extractelement <8 x double> %v99, i64 4
  store double %v127, ptr %v119, align 8
  %v128 = extractelement <8 x double> %v99, i64 5
  store double %v128, ptr %v120, align 8
  %v129 = extractelement <8 x double> %v99, i64 6
  store double %v129, ptr %v121, align 8
  %v130 = extractelement <8 x double> %v99, i64 7
  store double %v130, ptr %v122, align 8
  %v131 = add <8 x i64> %place.now, %v105
  %v132 = select <8 x i1> %due.good, <8 x i64> splat (i64 8), <8 x i64> zeroinitializer
  %clock.then = add <8 x i64> %clock.now, %v132
  %place.then = add <8 x i64> %place.now, %v132
  %v133 = select <8 x i1> %due.good, <8 x i64> splat (i64 1), <8 x i64> zeroinitializer
  %truth_place.then = add <8 x i64> %truth_place.now, %v133
  %v134 = extractelement <8 x i64> %clock.then, i64 0
  %v135 = extractelement <8 x i64> %clock.then, i64 1
  %v136 = extractelement <8 x i64> %clock.then, i64 2
  %v137 = extractelement <8 x i64> %clock.then, i64 3
  %v138 = extractelement <8 x i64> %clock.then, i64 4
  %v139 = extractelement <8 x i64> %clock.then, i64 5
  %v140 = extractelement <8 x i64> %clock.then, i64 6
  %v141 = extractelement <8 x i64> %clock.then, i64 7
  %v142 = inttoptr i64 %v134 to ptr
  %v143 = inttoptr i64 %v135 to ptr
  %v144 = inttoptr i64 %v136 to ptr
  %v145 = inttoptr i64 %v137 to ptr
  %v146 = inttoptr i64 %v138 to ptr
  %v147 = inttoptr i64 %v139 to ptr
  %v148 = inttoptr i64 %v140 to ptr
  %v149 = inttoptr i64 %v141 to ptr
  %v150 = load double, ptr %v142, align 8
  %v151 = insertelement <8 x double> poison, double %v150, i64 0
  %v152 = load double, ptr %v143, align 8
  %v153 = insertelement <8 x double> %v151, double %v152, i64 1
  %v154 = load double, ptr %v144, align 8
  %v155 = insertelement <8 x double> %v153, double %v154, i64 2
  %v156 = load double, ptr %v145, align 8
  %v157 = insertelement <8 x double> %v155, double %v156, i64 3
  %v158 = load double, ptr %v146, align 8
  %v159 = insertelement <8 x double> %v157, double %v158, i64 4
  %v160 = load double, ptr %v147, align 8
  %v161 = insertelement <8 x double> %v159, double %v160, i64 5
  %v162 = load double, ptr %v148, align 8
  %v163 = insertelement <8 x double> %v161, double %v162, i64 6
  %v164 = load double, ptr %v149, align 8
  %v165 = insertelement <8 x double> %v163, double %v164, i64 7
  %at.then = select <8 x i1> %due.good, <8 x double> %v165, <8 x double> %at.now
  %v166 = fcmp olt <8 x double> %at.then, %v2
  %v167 = fcmp ole <8 x double> %at.then, %v2
  %v168 = select <8 x i1> %v6, <8 x i1> %v166, <8 x i1> %v167
  %due.then = and <8 x i1> %due.good, %v168
  %v169 = bitcast <8 x i1> %due.then to i8
  %v170 = icmp ne i8 %v169, 0
  br i1 %v170, label %next, label %done
done:
  %v171 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  store <8 x double> %at.then, ptr %v171, align 64
  %v172 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 15
  store <8 x i64> %clock.then, ptr %v172, align 64
  %v173 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 16
  store <8 x i64> %place.then, ptr %v173, align 64
  %v174 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 17
  store <8 x i64> %truth_place.then, ptr %v174, align 64
  %v175 = select <8 x i1> %strayed.then, <8 x double> %at.then, <8 x double> %v2
  %v176 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  store <8 x double> %v175, ptr %v176, align 64
  %v177 = bitcast <8 x i1> %strayed.then to i8
  %v178 = zext i8 %v177 to i64
  ret i64 %v178
}

define void @uq_outcomes(ptr noalias readonly %given, ptr noalias %taken, i64 %groups) #0 {
entry:
  %some = icmp sgt i64 %groups, 0
  br i1 %some, label %group, label %done
group:
  %g = phi i64 [ 0, %entry ], [ %next, %group ]
  %in = mul i64 %g, 2
  %out = mul i64 %g, 0
  %from = getelementptr inbounds <8 x double>, ptr %given, i64 %in
  %to = getelementptr inbounds <8 x double>, ptr %taken, i64 %out

  %next = add i64 %g, 1
  %more = icmp slt i64 %next, %groups
  br i1 %more, label %group, label %done
done:
  ret void
}

define void @uq_starts(ptr noalias readonly %given, ptr noalias %taken, i64 %groups) #0 {
entry:
  %some = icmp sgt i64 %groups, 0
  br i1 %some, label %group, label %done
group:
  %g = phi i64 [ 0, %entry ], [ %next, %group ]
  %in = mul i64 %g, 2
  %out = mul i64 %g, 1
  %from = getelementptr inbounds <8 x double>, ptr %given, i64 %in
  %to = getelementptr inbounds <8 x double>, ptr %taken, i64 %out
  %v1 = getelementptr inbounds <8 x double>, ptr %from, i64 1
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %to, i64 0
  store <8 x double> %v2, ptr %v3, align 64
  %next = add i64 %g, 1
  %more = icmp slt i64 %next, %groups
  br i1 %more, label %group, label %done
done:
  ret void
}

define internal <8 x double> @table.loss(<8 x double> %x) #0 {
entry:
  %v1 = fcmp olt <8 x double> %x, splat (double 0x406F400000000000)
  %v2 = select <8 x i1> %v1, <8 x double> splat (double 0x406F400000000000), <8 x double> %x
  %v3 = fcmp oge <8 x double> %v2, splat (double 0x4072C00000000000)
  %v4 = select <8 x i1> %v3, <8 x double> splat (double 0x4072C00000000000), <8 x double> splat (double 0x406F400000000000)
  %v5 = select <8 x i1> %v3, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v6 = select <8 x i1> %v3, <8 x double> splat (double 0x3F9A54D880BB3EE7), <8 x double> splat (double 0x3F8B4E81B4E81B4F)
  %v7 = select <8 x i1> %v3, <8 x double> splat (double 0x3F23F90E69FD26FF), <8 x double> splat (double 0x3F23F90E69FD26FE)
  %v8 = select <8 x i1> %v3, <8 x double> splat (double 0xBE7990B64A39CB92), <8 x double> splat (double 0xBE9990B64A39CB92)
  %v9 = fsub <8 x double> %v2, %v4
  %v10 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v8, <8 x double> %v9, <8 x double> %v7)
  %v11 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v10, <8 x double> %v9, <8 x double> %v6)
  %v12 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v11, <8 x double> %v9, <8 x double> %v5)
  %v13 = fcmp oge <8 x double> %x, splat (double 0x4079000000000000)
  %v14 = select <8 x i1> %v13, <8 x double> splat (double 0x4014000000000000), <8 x double> %v12
  ret <8 x double> %v14
}

declare <8 x double> @llvm.fabs.v8f64(<8 x double>)
declare <8 x double> @llvm.fma.v8f64(<8 x double>, <8 x double>, <8 x double>)
declare <8 x double> @llvm.sqrt.v8f64(<8 x double>)

attributes #0 = { nounwind }
attributes #1 = { nounwind alignstack=64 }
